// SPDX-License-Identifier: GPL-2.0-or-later
// Goes through GDAL's file layer, so that it works wherever GDAL writes (UTF-8 paths, memory).
#include "core/geo/pendingfile.h"

#include <atomic>
#include <stdexcept>
#include <utility>

#include <cpl_conv.h>
#include <cpl_multiproc.h>
#include <cpl_vsi.h>

namespace stillhead
{

  namespace
  {
    constexpr const char *SIDECARS[] = { ".aux.xml", ".ovr", ".msk" };

    std::string pendingPath( const std::string &destination )
    {
      static std::atomic<unsigned> count { 0 };
      const std::size_t slash = destination.find_last_of( "/\\" );
      const std::size_t nameAt = slash == std::string::npos ? 0 : slash + 1;
      std::size_t dot = destination.find_last_of( '.' );
      if ( dot == std::string::npos || dot <= nameAt )
        dot = destination.size();
      return destination.substr( 0, dot ) + ".part" + std::to_string( CPLGetCurrentProcessID() ) + "-"
        + std::to_string( ++count ) + destination.substr( dot );
    }
  } // namespace

  PendingFile::PendingFile( std::string destination )
    : mDestination( std::move( destination ) )
    , mPath( pendingPath( mDestination ) )
  {
  }

  PendingFile::~PendingFile()
  {
    if ( mIsCommitted )
      return;
    VSIUnlink( mPath.c_str() );
    for ( const char *sidecar : SIDECARS )
      VSIUnlink( ( mPath + sidecar ).c_str() );
  }

  void PendingFile::commit()
  {
    // Some systems do not rename over a file.
    if ( VSIRename( mPath.c_str(), mDestination.c_str() ) != 0
      && ( VSIUnlink( mDestination.c_str() ) != 0 || VSIRename( mPath.c_str(), mDestination.c_str() ) != 0 ) )
      throw std::runtime_error( "The result cannot be put in its place at \"" + mDestination
        + "\"; check that no other program has the file open." );
    mIsCommitted = true;
    for ( const char *sidecar : SIDECARS )
    {
      VSIStatBufL found;
      if ( VSIStatL( ( mDestination + sidecar ).c_str(), &found ) == 0 )
        VSIUnlink( ( mDestination + sidecar ).c_str() );
    }
  }

} // namespace stillhead
