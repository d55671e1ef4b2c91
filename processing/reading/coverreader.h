// SPDX-License-Identifier: GPL-2.0-or-later
// The depth of cover of a drawn feature: its own `cover` field where set, else what COVER gives for it.
#pragma once

#include "processing/displayunits.h"
#include "processing/reading/parametervalues.h"

#include <qgsexpressioncontext.h>
#include <qgsfeature.h>
#include <qgsprocessingfeedback.h>
#include <qgsproperty.h>

namespace stillhead
{

  class CoverReader
  {
    public:
      CoverReader( const ParameterValues &values, const DisplayUnits &units );

      //! Features of a layer follow; \a what names the layer in sentences.
      void beginLayer( const QgsFields &fields, const QgsExpressionContext &expressions, const QString &what );

      /**
       * Cover of \a feature in metres.
       * \throws QgsProcessingException where it is no number, naming the feature
       */
      double coverM( const QgsFeature &feature );

      //! Says how many features had a cover of their own, and warns of covers that look wrong.
      void report( QgsProcessingFeedback &feedback ) const;

    private:
      double checked( const QVariant &value, const QgsFeature &feature, const QString &origin ) const;

      const DisplayUnits &mUnits;
      QgsProperty mProperty; //!< invalid where COVER is one value for all
      double mDefault = 0.0; //!< in the length unit
      QgsExpressionContext mExpressions;
      QString mWhat;
      int mField = -1;
      long long mFeatures = 0;
      long long mOwn = 0;
      long long mNegative = 0;
      long long mDeep = 0;
  };

} // namespace stillhead
