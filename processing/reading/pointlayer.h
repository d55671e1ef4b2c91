// SPDX-License-Identifier: GPL-2.0-or-later
// A layer of points with figures (sources, devices): fields by name whatever their case, missing ones as if blank,
// places in the CRS of the drawing. What cannot be read is refused with the layer, the feature and the field.
#pragma once

#include "core/network/drawing.h"
#include "core/plan/plan.h"
#include "processing/displayunits.h"

#include <qgscoordinatereferencesystem.h>
#include <qgscoordinatetransformcontext.h>
#include <qgsfeature.h>
#include <qgsprocessingutils.h>

#include <functional>
#include <optional>

namespace stillhead
{

  //! One feature of a point layer while it is read.
  class PointRow
  {
    public:
      PointRow( const QgsFeature &feature, const QString &parameterName, const DisplayUnits &units );

      //! The text of a field, trimmed; blank where there is none.
      QString text( const QString &field ) const;

      //! A number. \throws QgsProcessingException where the field holds something else
      std::optional<double> number( const QString &field ) const;

      //! A pressure in pascals. \throws QgsProcessingException where it is no number, negative or beyond all supply
      std::optional<double> pressurePa( const QString &field ) const;

      //! A length or elevation in metres.
      std::optional<double> lengthM( const QString &field ) const;

      //! Throws QgsProcessingException: "DEVICES, feature 3: " and \a sentence.
      [[noreturn]] void refuse( const QString &sentence ) const;

      //! Its `name`, else "feature 3".
      QString name() const;

      QgsFeatureId fid() const { return mFeature.id(); }

    private:
      QVariant value( const QString &field ) const;

      const QgsFeature &mFeature;
      QString mParameterName;
      const DisplayUnits &mUnits;
  };

  /**
   * Calls \a read( row, place, system ) for every feature, in layer order; features without a point are refused.
   * \param drawing gets a system that no line has if a row names one
   * \throws QgsProcessingException
   */
  void readPoints( const QgsProcessingFeatureSource &layer, const QString &parameterName, const DisplayUnits &units,
    const QgsCoordinateReferenceSystem &crs, const QgsCoordinateTransformContext &transforms, Drawing &drawing,
    const std::function<void( const PointRow &row, const PlanPoint &place, int system )> &read );

} // namespace stillhead
