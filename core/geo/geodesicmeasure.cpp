// SPDX-License-Identifier: GPL-2.0-or-later
// Short legs, which is nearly all of them, go by Gauss's mid-latitude formulas with their second-order terms: they
// agree with the full inverse geodesic to the last digits of the coordinates (3 nm) and cost a tenth of it. Longer legs
// go by PROJ's inverse geodesic.
#include "core/geo/geodesicmeasure.h"

#include "core/geo/crs.h"

#include <cmath>
#include <stdexcept>

namespace stillhead
{

  namespace
  {
    constexpr double DEGREES_PER_RADIAN = 180.0 / 3.14159265358979323846;

    //! Legs within this many radians of latitude and of longitude count as short (10 km at the equator).
    constexpr double SHORT_LEG_RADIANS = 0.0015;

    //! Half the step of the derivatives in scaleAt(): long enough for the digits, short enough for the curvature.
    constexpr double DERIVATIVE_STEP_M = 10.0;

    [[noreturn]] void throwOutside( const PlanPoint &place )
    {
      throw std::runtime_error( "The place (" + std::to_string( place.x ) + ", " + std::to_string( place.y )
        + ") lies outside the area in which the CRS of the lines can be used; check the CRS of the layer." );
    }

    bool isFinite( double a, double b )
    {
      return std::isfinite( a ) && std::isfinite( b );
    }

    //! The horizontal CRS without a bound datum shift; throws where there is none.
    ProjObject planCrs( PJ_CONTEXT *context, const std::string &definition )
    {
      ProjObject crs = unboundCrs( context, horizontalCrs( context, definition ) );
      if ( !crs )
        throw std::runtime_error(
          "The CRS of the lines cannot be understood or does not describe a plan; set a projected or geographic CRS." );
      return crs;
    }

    //! Radii of curvature in the meridian and across it.
    struct Radii
    {
        double meridianM;
        double acrossM;
    };

    Radii radiiAt( double semiMajorM, double eccentricitySquared, double sineSquared )
    {
      const double w2 = 1.0 - eccentricitySquared * sineSquared;
      const double acrossM = semiMajorM / std::sqrt( w2 );
      return { acrossM * ( 1.0 - eccentricitySquared ) / w2, acrossM };
    }
  } // namespace

  std::unique_ptr<PlanMeasure> makePlanMeasure( const std::string &definition )
  {
    {
      const ProjContext context = makeProjContext();
      const ProjObject crs = planCrs( context.get(), definition );
      const ProjObject ellipsoid( proj_get_ellipsoid( context.get(), crs.get() ) );
      if ( !ellipsoid )
        return std::make_unique<PlanarMeasure>( axisUnitMetres( definition ).value_or( 1.0 ) );
    }
    return std::make_unique<GeodesicMeasure>( definition );
  }

  GeodesicMeasure::GeodesicMeasure( const std::string &definition )
    : mContext( makeProjContext() )
  {
    PJ_CONTEXT *context = mContext.get();
    const ProjObject crs = planCrs( context, definition );
    const ProjObject ellipsoid( proj_get_ellipsoid( context, crs.get() ) );
    double semiMinorM = 0.0;
    double inverseFlattening = 0.0;
    if ( !ellipsoid
      || !proj_ellipsoid_get_parameters(
        context, ellipsoid.get(), &mSemiMajorM, &semiMinorM, nullptr, &inverseFlattening ) )
      throw std::runtime_error( "The CRS of the lines has no ellipsoid to measure on." );
    mFlattening = inverseFlattening != 0.0 ? 1.0 / inverseFlattening : 0.0;
    geod_init( &mGeodesic, mSemiMajorM, mFlattening );

    const ProjObject geographic( proj_crs_get_geodetic_crs( context, crs.get() ) );
    const ProjObject system( proj_crs_get_coordinate_system( context, geographic.get() ) );
    if ( !system
      || !proj_cs_get_axis_info(
        context, system.get(), 0, nullptr, nullptr, nullptr, &mRadiansPerUnit, nullptr, nullptr, nullptr ) )
      throw std::runtime_error( "The CRS of the lines does not say in which unit its angles are." );
    mPlanUnitM = axisUnitMetres( definition ).value_or( mSemiMajorM * mRadiansPerUnit );

    const PJ_TYPE type = proj_get_type( crs.get() );
    const bool isGeographic = type == PJ_TYPE_GEOGRAPHIC_2D_CRS || type == PJ_TYPE_GEOGRAPHIC_3D_CRS;
    if ( isGeographic && !proj_crs_is_derived( context, crs.get() ) )
      return;
    const ProjObject raw( proj_create_crs_to_crs_from_pj( context, crs.get(), geographic.get(), nullptr, nullptr ) );
    if ( raw )
      mToGeographic.reset( proj_normalize_for_visualization( context, raw.get() ) );
    if ( !mToGeographic )
      throw std::runtime_error( "The CRS of the lines cannot be taken back to latitude and longitude." );
  }

  GeodesicMeasure::GeodesicMeasure( const GeodesicMeasure &other )
    : PlanMeasure()
    , mContext( makeProjContext() )
    , mToGeographic( other.mToGeographic ? proj_clone( mContext.get(), other.mToGeographic.get() ) : nullptr )
    , mRadiansPerUnit( other.mRadiansPerUnit )
    , mPlanUnitM( other.mPlanUnitM )
    , mSemiMajorM( other.mSemiMajorM )
    , mFlattening( other.mFlattening )
    , mGeodesic( other.mGeodesic )
  {
  }

  std::unique_ptr<PlanMeasure> GeodesicMeasure::clone() const
  {
    return std::unique_ptr<PlanMeasure>( new GeodesicMeasure( *this ) );
  }

  const GeodesicMeasure::Place *GeodesicMeasure::toPlaces( const PlanPoint *vertices, std::size_t count ) const
  {
    if ( mPlaces.size() < count )
      mPlaces.resize( count );
    for ( std::size_t i = 0; i < count; ++i )
      mPlaces[i] = { vertices[i].x, vertices[i].y };
    if ( mToGeographic )
    {
      proj_trans_generic( mToGeographic.get(), PJ_FWD, &mPlaces[0].longitude, sizeof( Place ), count,
        &mPlaces[0].latitude, sizeof( Place ), count, nullptr, 0, 0, nullptr, 0, 0 );
    }
    for ( std::size_t i = 0; i < count; ++i )
    {
      Place &place = mPlaces[i];
      place.longitude *= mRadiansPerUnit;
      place.latitude *= mRadiansPerUnit;
      if ( !isFinite( place.longitude, place.latitude )
        || std::abs( place.latitude ) * DEGREES_PER_RADIAN > 90.0 + 1e-9 )
        throwOutside( vertices[i] );
    }
    return mPlaces.data();
  }

  double GeodesicMeasure::legM( const Place &from, const Place &to ) const
  {
    const double dLatitude = to.latitude - from.latitude;
    const double dLongitude = to.longitude - from.longitude;
    if ( std::abs( dLatitude ) > SHORT_LEG_RADIANS || std::abs( dLongitude ) > SHORT_LEG_RADIANS )
    {
      double lengthM = 0.0;
      geod_inverse( &mGeodesic, from.latitude * DEGREES_PER_RADIAN, from.longitude * DEGREES_PER_RADIAN,
        to.latitude * DEGREES_PER_RADIAN, to.longitude * DEGREES_PER_RADIAN, &lengthM, nullptr, nullptr );
      return lengthM;
    }
    // Gauss's mid-latitude formulas (from memory; the tests hold them against geod_inverse), written in sines and
    // cosines so that the poles are no exception: eta2 = e'^2 cos^2, and e'^2 sin^2 where they have eta2 tan^2.
    const double eccentricitySquared = mFlattening * ( 2.0 - mFlattening );
    const double secondEccentricitySquared = eccentricitySquared / ( 1.0 - eccentricitySquared );
    const double middle = 0.5 * ( from.latitude + to.latitude );
    const double sine = std::sin( middle );
    const double cosine = std::cos( middle );
    const double sineSquared = sine * sine;
    const double cosineSquared = cosine * cosine;
    const Radii radii = radiiAt( mSemiMajorM, eccentricitySquared, sineSquared );
    const double eta2 = secondEccentricitySquared * cosineSquared;
    const double eta2Tan2 = secondEccentricitySquared * sineSquared;
    const double v4 = ( 1.0 + eta2 ) * ( 1.0 + eta2 );
    const double lat2 = dLatitude * dLatitude;
    const double lon2 = dLongitude * dLongitude;
    const double eastM = radii.acrossM * cosine * dLongitude
      * ( 1.0 - lon2 * sineSquared / 24.0 + lat2 * ( 1.0 + eta2 - 9.0 * eta2Tan2 ) / ( 24.0 * v4 ) );
    const double northM = radii.meridianM * dLatitude
      * ( 1.0 - lon2 * ( 2.0 * cosineSquared + 3.0 * sineSquared + 2.0 * eta2 * cosineSquared ) / 24.0
        - lat2 * ( eta2Tan2 - eta2 * ( 1.0 + eta2 + 4.0 * eta2Tan2 ) ) / ( 8.0 * v4 ) );
    return std::sqrt( eastM * eastM + northM * northM );
  }

  void GeodesicMeasure::distancesAlongM( const PlanPoint *vertices, std::size_t count, double *distancesM ) const
  {
    if ( count == 0 )
      return;
    const Place *places = toPlaces( vertices, count );
    double along = 0.0;
    distancesM[0] = 0.0;
    for ( std::size_t i = 1; i < count; ++i )
    {
      along += legM( places[i - 1], places[i] );
      distancesM[i] = along;
    }
  }

  GroundScale GeodesicMeasure::scaleAt( const PlanPoint &place ) const
  {
    const double step = DERIVATIVE_STEP_M / mPlanUnitM;
    const PlanPoint around[] = { place, { place.x - step, place.y }, { place.x + step, place.y },
      { place.x, place.y - step }, { place.x, place.y + step } };
    const std::size_t count = mToGeographic ? 5 : 1;
    const Place *places = toPlaces( around, count );
    const double sine = std::sin( places[0].latitude );
    const Radii radii = radiiAt( mSemiMajorM, mFlattening * ( 2.0 - mFlattening ), sine * sine );
    const double eastM = radii.acrossM * std::cos( places[0].latitude );
    const double northM = radii.meridianM;
    if ( !mToGeographic )
      return { eastM * mRadiansPerUnit, 0.0, 0.0, northM * mRadiansPerUnit };
    // A step over the antimeridian jumps by a whole turn.
    const auto turned = []( double angle ) { return std::remainder( angle, 2.0 * 180.0 / DEGREES_PER_RADIAN ); };
    const double perUnit = 0.5 / step;
    return { eastM * turned( places[2].longitude - places[1].longitude ) * perUnit,
      eastM * turned( places[4].longitude - places[3].longitude ) * perUnit,
      northM * ( places[2].latitude - places[1].latitude ) * perUnit,
      northM * ( places[4].latitude - places[3].latitude ) * perUnit };
  }

} // namespace stillhead
