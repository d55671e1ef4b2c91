// SPDX-License-Identifier: GPL-2.0-or-later
// Equivalence is PROJ's; heights are left out by taking the horizontal part of both CRSs before it is asked.
#include "core/geo/terraintransform.h"

#include "core/geo/crs.h"

#include <cmath>
#include <cstring>
#include <limits>
#include <stdexcept>

namespace stillhead
{

  namespace
  {
    //! Transforms in place; PROJ marks what fails with HUGE_VAL.
    template <typename Point> void run( PJ *operation, PJ_DIRECTION direction, Point *points, std::size_t count )
    {
      if ( count == 0 )
        return;
      proj_trans_generic( operation, direction, &points[0].x, sizeof( Point ), count, &points[0].y, sizeof( Point ),
        count, nullptr, 0, 0, nullptr, 0, 0 );
      for ( std::size_t i = 0; i < count; ++i )
      {
        if ( !std::isfinite( points[i].x ) || !std::isfinite( points[i].y ) )
          points[i].x = points[i].y = std::numeric_limits<double>::quiet_NaN();
      }
    }

    ProjObject readPlan( PJ_CONTEXT *context, const std::string &definition, const char *whose )
    {
      ProjObject crs = horizontalCrs( context, definition );
      if ( !crs )
        throw std::runtime_error( std::string( "The CRS of the " ) + whose
          + " cannot be understood or does not describe a plan; set a projected or geographic CRS." );
      return crs;
    }

    bool isSame( PJ_CONTEXT *context, const PJ *first, const PJ *second )
    {
      return proj_is_equivalent_to_with_ctx( context, first, second, PJ_COMP_EQUIVALENT_EXCEPT_AXIS_ORDER_GEOGCRS )
        != 0;
    }

    bool isNothingToDo( PJ *operation )
    {
      const char *definition = proj_pj_info( operation ).definition;
      return definition && std::strcmp( definition, "proj=noop" ) == 0;
    }
  } // namespace

  bool isSamePlan( const std::string &first, const std::string &second )
  {
    if ( first == second )
      return true;
    const ProjContext context = makeProjContext();
    const ProjObject a = horizontalCrs( context.get(), first );
    const ProjObject b = horizontalCrs( context.get(), second );
    return a && b && isSame( context.get(), a.get(), b.get() );
  }

  std::unique_ptr<PlanToTerrain> makePlanToTerrain(
    const std::string &lines, const std::string &terrain, const std::string &operation )
  {
    if ( isSamePlan( lines, terrain ) )
      return std::make_unique<SamePlan>();
    return std::make_unique<TerrainTransform>( lines, terrain, operation );
  }

  TerrainTransform::TerrainTransform(
    const std::string &lines, const std::string &terrain, const std::string &operation )
    : mContext( makeProjContext() )
  {
    PJ_CONTEXT *context = mContext.get();
    const ProjObject from = readPlan( context, lines, "lines" );
    const ProjObject to = readPlan( context, terrain, "terrain" );
    if ( !operation.empty() )
    {
      mOperation.reset( proj_create( context, operation.c_str() ) );
    }
    else
    {
      const ProjObject raw( proj_create_crs_to_crs_from_pj( context, from.get(), to.get(), nullptr, nullptr ) );
      if ( raw )
        mOperation.reset( proj_normalize_for_visualization( context, raw.get() ) );
    }
    if ( !mOperation )
      throw std::runtime_error(
        "There is no way from the CRS of the lines to the CRS of the terrain; reproject one of the layers." );
    mIsIdentity = isSame( context, from.get(), to.get() ) || isNothingToDo( mOperation.get() );
  }

  TerrainTransform::TerrainTransform( const TerrainTransform &other )
    : PlanToTerrain()
    , mContext( makeProjContext() )
    , mOperation( proj_clone( mContext.get(), other.mOperation.get() ) )
    , mIsIdentity( other.mIsIdentity )
  {
  }

  std::unique_ptr<PlanToTerrain> TerrainTransform::clone() const
  {
    return std::unique_ptr<PlanToTerrain>( new TerrainTransform( *this ) );
  }

  void TerrainTransform::transform( const PlanPoint *plan, TerrainPoint *terrain, std::size_t count ) const
  {
    for ( std::size_t i = 0; i < count; ++i )
      terrain[i] = { plan[i].x, plan[i].y };
    if ( !mIsIdentity )
      run( mOperation.get(), PJ_FWD, terrain, count );
  }

  void TerrainTransform::transformBack( const TerrainPoint *terrain, PlanPoint *plan, std::size_t count ) const
  {
    for ( std::size_t i = 0; i < count; ++i )
      plan[i] = { terrain[i].x, terrain[i].y };
    if ( !mIsIdentity )
      run( mOperation.get(), PJ_INV, plan, count );
  }

} // namespace stillhead
