# SPDX-License-Identifier: GPL-2.0-or-later
# Finds QGIS, wraps it as the imported target stillhead_qgis (headers as SYSTEM, so that only our own
# warnings show), and decides where plugin, library and Python package go in QGIS's own folders.
list( APPEND CMAKE_MODULE_PATH /usr/share/qgis /usr/local/share/qgis )
find_package( QGIS QUIET MODULE )
if( NOT QGIS_FOUND )
  message( FATAL_ERROR "QGIS was not found. Install its development package (Debian: libqgis-dev), "
    "or configure with -DSTILLHEAD_CORE_ONLY=ON to build core and its tests without QGIS." )
endif()
if( QGIS_VERSION VERSION_LESS 3.22 )
  message( FATAL_ERROR "QGIS ${QGIS_VERSION} was found, 3.22 or newer is needed." )
endif()
message( STATUS "QGIS ${QGIS_VERSION}" )

add_library( stillhead_qgis INTERFACE )
target_include_directories( stillhead_qgis SYSTEM INTERFACE ${QGIS_INCLUDE_DIR} ${QGIS_UI_INCLUDE_DIR} )
target_link_libraries( stillhead_qgis INTERFACE ${QGIS_CORE_LIBRARY} ${QGIS_ANALYSIS_LIBRARY}
  Qt5::Core Qt5::Gui Qt5::Widgets Qt5::Xml Qt5::Svg GDAL::GDAL )

add_library( stillhead_qgis_gui INTERFACE )
target_link_libraries( stillhead_qgis_gui INTERFACE stillhead_qgis ${QGIS_GUI_LIBRARY} )

# Where QGIS looks. Relative to the prefix, so that `cmake --install build --prefix X` works too.
get_filename_component( STILLHEAD_QGIS_PREFIX "${QGIS_CORE_LIBRARY}" DIRECTORY )
string( REGEX REPLACE "/lib(64)?(/[^/]+)?$" "" STILLHEAD_QGIS_PREFIX "${STILLHEAD_QGIS_PREFIX}" )
if( STILLHEAD_PREFIX_OPEN )
  set( CMAKE_INSTALL_PREFIX "${STILLHEAD_QGIS_PREFIX}" CACHE PATH "QGIS's own prefix" FORCE )
  set( STILLHEAD_PREFIX_OPEN OFF CACHE INTERNAL "" )
endif()
set( STILLHEAD_PLUGIN_DIR "lib/qgis/plugins" CACHE STRING "QGIS's folder of native plugins, below the prefix" )
set( STILLHEAD_PYTHON_DIR "share/qgis/python/plugins" CACHE STRING "QGIS's folder of Python plugins, below the prefix" )

set( CMAKE_LIBRARY_OUTPUT_DIRECTORY "${PROJECT_BINARY_DIR}/lib" )
