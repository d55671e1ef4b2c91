// SPDX-License-Identifier: GPL-2.0-or-later
// Coordinates are taken as arrays. A part that is not a line (points or areas in a mixed layer) has no vertices for us.
#include "processing/reading/lineextractor.h"

#include "core/geo/geodesicmeasure.h"
#include "processing/reading/drawingreader.h"
#include "processing/reading/layercrs.h"

#include <qgscurve.h>
#include <qgsgeometrycollection.h>
#include <qgslinestring.h>

#include <QVector>

#include <algorithm>
#include <cmath>
#include <limits>

namespace stillhead
{

  LineExtractor::LineExtractor( Drawing &drawing, const QgsCoordinateReferenceSystem &layer,
    const QgsCoordinateReferenceSystem &results, const QgsCoordinateTransformContext &context, double metresPerZ )
    : mDrawing( drawing )
    , mTransform( layer, results, context )
    , mMeasure( makePlanMeasure( crsDefinition( layer ) ) )
    , mMetresPerZ( metresPerZ )
  {
  }

  void LineExtractor::add( const QgsGeometry &geometry, const DrawnLine &model )
  {
    DrawnLine line = model;
    const QgsAbstractGeometry *whole = geometry.constGet();
    const auto *collection = dynamic_cast<const QgsGeometryCollection *>( whole );
    const int parts = collection ? collection->numGeometries() : 1;
    for ( int part = 0; part < std::max( 1, parts ); ++part )
    {
      line.part = part;
      addPart( collection ? collection->geometryN( part ) : whole, line );
    }
  }

  double LineExtractor::chordTolerance( const QgsAbstractGeometry &curve ) const
  {
    const QgsPoint start = curve.vertexAt( QgsVertexId( 0, 0, 0 ) );
    const GroundScale scale = mMeasure->scaleAt( { start.x(), start.y() } );
    // Metres per plan unit where they are most: the tolerance holds in every direction.
    const double metresPerUnit = std::max( scale.distanceM( 1.0, 0.0 ), scale.distanceM( 0.0, 1.0 ) );
    return CHORD_TOLERANCE_M / metresPerUnit;
  }

  void LineExtractor::addPart( const QgsAbstractGeometry *part, DrawnLine line )
  {
    line.first = mDrawing.vertices.size();
    line.count = 0;
    const auto *curve = dynamic_cast<const QgsCurve *>( part );
    const auto *straight = dynamic_cast<const QgsLineString *>( part );
    std::unique_ptr<QgsLineString> chords;
    if ( curve && !straight && !curve->isEmpty() )
    {
      ++mCurves;
      chords.reset( curve->curveToLine( chordTolerance( *curve ), QgsAbstractGeometry::MaximumDifference ) );
      straight = chords.get();
    }
    if ( straight && !straight->isEmpty() )
    {
      const int count = straight->numPoints();
      QVector<double> x( count );
      QVector<double> y( count );
      std::copy_n( straight->xData(), count, x.begin() );
      std::copy_n( straight->yData(), count, y.begin() );
      if ( !mTransform.isShortCircuited() )
      {
        QVector<double> heights( count, 0.0 );
        mTransform.transformCoords( count, x.data(), y.data(), heights.data() );
      }
      line.count = static_cast<std::size_t>( count );
      for ( int i = 0; i < count; ++i )
      {
        mDrawing.vertices.push_back( { x[i], y[i] } );
        if ( mMetresPerZ > 0.0 )
          mDrawing.surveyZM.push_back(
            straight->is3D() ? straight->zAt( i ) * mMetresPerZ : std::numeric_limits<double>::quiet_NaN() );
      }
    }
    mDrawing.lines.push_back( line );
  }

} // namespace stillhead
