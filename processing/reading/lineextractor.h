// SPDX-License-Identifier: GPL-2.0-or-later
// Takes geometries of one layer apart into lines of a Drawing, reprojected to the results' CRS.
#pragma once

#include "core/network/drawing.h"
#include "core/plan/plan.h"

#include <qgscoordinatetransform.h>
#include <qgscoordinatetransformcontext.h>
#include <qgsgeometry.h>

#include <memory>

namespace stillhead
{

  class LineExtractor
  {
    public:
      //! \a metresPerZ 0: drawn Z is not wanted
      LineExtractor( Drawing &drawing, const QgsCoordinateReferenceSystem &layer,
        const QgsCoordinateReferenceSystem &results, const QgsCoordinateTransformContext &context, double metresPerZ );

      /**
       * Appends a line like \a model for every part of \a geometry; one without vertices for what has none.
       * \throws QgsCsException where it cannot be reprojected
       */
      void add( const QgsGeometry &geometry, const DrawnLine &model );

      long long curves() const { return mCurves; }

    private:
      void addPart( const QgsAbstractGeometry *part, DrawnLine line );
      double chordTolerance( const QgsAbstractGeometry &curve ) const;

      Drawing &mDrawing;
      QgsCoordinateTransform mTransform;
      std::unique_ptr<PlanMeasure> mMeasure; //!< of the layer's own CRS
      double mMetresPerZ;
      long long mCurves = 0;
  };

} // namespace stillhead
