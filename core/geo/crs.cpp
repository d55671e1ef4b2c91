// SPDX-License-Identifier: GPL-2.0-or-later
// Asks PROJ; nothing is guessed from names save the placeholders, which have nothing but their names.
#include "core/geo/crs.h"

#include <algorithm>
#include <array>
#include <cctype>
#include <utility>

#include <proj_experimental.h>

namespace stillhead
{

  namespace
  {
    //! How the names begin under which GeoPackage, GDAL, PROJ and QGIS keep "no CRS".
    constexpr std::array<const char *, 5> PLACEHOLDERS { "undefined geographic srs", "undefined cartesian srs",
      "undefined srs", "unknown engineering crs", "unknown crs" };

    bool isBlank( const std::string &text )
    {
      return std::all_of( text.begin(), text.end(), []( unsigned char c ) { return std::isspace( c ) != 0; } );
    }

    std::string lowered( std::string text )
    {
      std::transform( text.begin(), text.end(), text.begin(),
        []( unsigned char c ) { return static_cast<char>( std::tolower( c ) ); } );
      return text;
    }

    //! Types that say where on the plan a place lies.
    bool isPlan( const PJ *crs )
    {
      const PJ_TYPE type = proj_get_type( crs );
      return type != PJ_TYPE_VERTICAL_CRS && type != PJ_TYPE_GEOCENTRIC_CRS && type != PJ_TYPE_TEMPORAL_CRS
        && type != PJ_TYPE_COMPOUND_CRS;
    }

    bool isBound( const PJ *crs )
    {
      return proj_get_type( crs ) == PJ_TYPE_BOUND_CRS;
    }

    ProjObject part( PJ_CONTEXT *context, const PJ *compound, int index )
    {
      return ProjObject( proj_crs_get_sub_crs( context, compound, index ) );
    }

    struct Axis
    {
        double unit = 1.0; //!< Metres or radians
        std::string unitName;
        bool isAngle = false;
    };

    std::optional<Axis> axis( PJ_CONTEXT *context, const PJ *crs, int index )
    {
      const ProjObject system( proj_crs_get_coordinate_system( context, crs ) );
      if ( !system || index >= proj_cs_get_axis_count( context, system.get() ) )
        return std::nullopt;
      Axis found;
      const char *name = nullptr;
      const char *direction = nullptr;
      if ( !proj_cs_get_axis_info(
             context, system.get(), index, nullptr, nullptr, &direction, &found.unit, &name, nullptr, nullptr ) )
        return std::nullopt;
      found.unitName = name ? name : "";
      const PJ_COORDINATE_SYSTEM_TYPE type = proj_cs_get_type( context, system.get() );
      found.isAngle = type == PJ_CS_TYPE_ELLIPSOIDAL && index < 2;
      return found;
    }
  } // namespace

  ProjObject unboundCrs( PJ_CONTEXT *context, ProjObject crs )
  {
    while ( crs && isBound( crs.get() ) )
      crs.reset( proj_get_source_crs( context, crs.get() ) );
    return crs;
  }

  ProjObject horizontalCrs( PJ_CONTEXT *context, const std::string &definition )
  {
    ProjObject crs( proj_create( context, definition.c_str() ) );
    if ( !crs || !proj_is_crs( crs.get() ) )
      return nullptr;
    if ( isBound( crs.get() ) )
    {
      const ProjObject inside = unboundCrs( context, ProjObject( proj_clone( context, crs.get() ) ) );
      if ( inside && proj_get_type( inside.get() ) == PJ_TYPE_COMPOUND_CRS )
        crs = part( context, inside.get(), 0 );
      else if ( !inside || !isPlan( inside.get() ) )
        return nullptr;
    }
    else if ( proj_get_type( crs.get() ) == PJ_TYPE_COMPOUND_CRS )
    {
      crs = part( context, crs.get(), 0 );
    }
    if ( !crs || isBound( crs.get() ) )
      return crs;
    if ( !isPlan( crs.get() ) )
      return nullptr;
    if ( axis( context, crs.get(), 2 ) )
    {
      ProjObject flat( proj_crs_demote_to_2D( context, nullptr, crs.get() ) );
      if ( flat )
        return flat;
    }
    return crs;
  }

  std::string horizontalDefinition( const std::string &definition )
  {
    if ( !verticalUnit( definition ) )
      return definition;
    const ProjContext context = makeProjContext();
    const ProjObject crs = horizontalCrs( context.get(), definition );
    const char *wkt = crs ? proj_as_wkt( context.get(), crs.get(), PJ_WKT2_2019, nullptr ) : nullptr;
    return wkt ? wkt : definition;
  }

  bool isPlaceholderCrs( const std::string &definition )
  {
    if ( isBlank( definition ) )
      return true;
    const ProjContext context = makeProjContext();
    const ProjObject crs( proj_create( context.get(), definition.c_str() ) );
    if ( !crs )
      return false;
    if ( proj_get_id_code( crs.get(), 0 ) )
      return false;
    const char *text = proj_get_name( crs.get() );
    const std::string name = lowered( text ? text : "" );
    return std::any_of( PLACEHOLDERS.begin(), PLACEHOLDERS.end(),
      [&name]( const std::string &placeholder ) { return name.compare( 0, placeholder.size(), placeholder ) == 0; } );
  }

  std::optional<double> axisUnitMetres( const std::string &definition )
  {
    const ProjContext context = makeProjContext();
    const ProjObject crs = unboundCrs( context.get(), horizontalCrs( context.get(), definition ) );
    if ( !crs )
      return std::nullopt;
    const std::optional<Axis> first = axis( context.get(), crs.get(), 0 );
    if ( !first || first->isAngle )
      return std::nullopt;
    return first->unit;
  }

  std::optional<VerticalUnit> verticalUnit( const std::string &definition )
  {
    const ProjContext context = makeProjContext();
    ProjObject crs = unboundCrs( context.get(), ProjObject( proj_create( context.get(), definition.c_str() ) ) );
    if ( !crs || !proj_is_crs( crs.get() ) )
      return std::nullopt;
    int index = 2;
    if ( proj_get_type( crs.get() ) == PJ_TYPE_COMPOUND_CRS )
    {
      crs = unboundCrs( context.get(), part( context.get(), crs.get(), 1 ) );
      index = 0;
    }
    else if ( proj_get_type( crs.get() ) == PJ_TYPE_VERTICAL_CRS )
    {
      index = 0;
    }
    if ( !crs || proj_get_type( crs.get() ) == PJ_TYPE_GEOCENTRIC_CRS )
      return std::nullopt;
    const std::optional<Axis> up = axis( context.get(), crs.get(), index );
    if ( !up || up->isAngle || up->unit <= 0.0 )
      return std::nullopt;
    return VerticalUnit { up->unit, up->unitName };
  }

} // namespace stillhead
