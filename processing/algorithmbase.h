// SPDX-License-Identifier: GPL-2.0-or-later
// What our algorithms share: how they check parameters and how failures of any kind become one clear sentence.
#pragma once

#include "processing/reading/parametervalues.h"
#include "processing/sharedparameters.h"

#include <qgsprocessingalgorithm.h>

#include <functional>

namespace stillhead
{

  class AlgorithmBase : public QgsProcessingAlgorithm
  {
    public:
      QIcon icon() const override;
      QString svgIconPath() const override;

      //! Refuses unreadable numbers and choices in our own words before the platform does in its.
      bool checkParameterValues(
        const QVariantMap &parameters, QgsProcessingContext &context, QString *message = nullptr ) const override;

    protected:
      void addParameters( ParameterList list );
      void addNumberOutputs( const std::vector<std::pair<QString, QString>> &outputs );

      //! Parameters of a run, whose definitions are this algorithm's.
      ParameterValues valuesOf( const QVariantMap &parameters, QgsProcessingContext &context ) const;

      //! \a feedback, or \a silent for a runner that gives none.
      static QgsProcessingFeedback &feedbackOr( QgsProcessingFeedback *feedback, QgsProcessingFeedback &silent )
      {
        return feedback ? *feedback : silent;
      }

      /**
       * Runs \a work and rethrows whatever it throws as QgsProcessingException.
       * \returns what \a work returned
       */
      static QVariantMap guarded( const std::function<QVariantMap()> &work );
  };

} // namespace stillhead
