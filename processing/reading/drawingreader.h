// SPDX-License-Identifier: GPL-2.0-or-later
// The drawn layers as core takes them, in the CRS of MAINS: every part of every feature a line, curves as chords, cover
// and system from the features, and their attributes kept for the results. Nothing is dropped: what has no length
// goes along as an empty line, so that core reports it.
#pragma once

#include "core/feedback/monitor.h"
#include "core/network/drawing.h"
#include "core/plan/plan.h"
#include "core/units/units.h"
#include "processing/displayunits.h"
#include "processing/reading/parametervalues.h"
#include "processing/writing/drawnfields.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsexpressioncontext.h>
#include <qgsprocessingfeedback.h>
#include <qgsprocessingutils.h>

#include <memory>
#include <vector>

namespace stillhead
{

  //! A drawn feature; Drawing's lines name it by its index.
  struct DrawnFeature
  {
      Role role = Role::Mainline;
      QgsFeatureId fid = 0;
      QgsAttributes attributes; //!< as DrawnInput::fields has them
  };

  //! All that was drawn.
  struct DrawnInput
  {
      QgsCoordinateReferenceSystem crs; //!< of MAINS and of all results
      Drawing drawing;
      std::vector<DrawnFeature> features;
      DrawnFields fields;
  };

  //! Curves are followed to within this distance on the ground.
  constexpr double CHORD_TOLERANCE_M = 0.01;

  //! One drawn layer, ready to be read.
  struct DrawnLayer
  {
      QString parameterName;
      Role role = Role::Mainline;
      std::unique_ptr<QgsProcessingFeatureSource> source;
      QList<int> keys; //!< fields that are its primary key
      QgsExpressionContext expressions;
  };

  //! How drawn features are to be read.
  struct DrawingOptions
  {
      bool useLineZ = false;
      double metresPerZ = 1.0;
      QStringList reservedFields;
  };

  /**
   * Reads \a layers, mainlines first.
   * \throws QgsProcessingException for what cannot be read, with what to do; Cancelled
   */
  DrawnInput readDrawing( const std::vector<DrawnLayer> &layers, const DrawingOptions &options,
    const DisplayUnits &units, const ParameterValues &values, QgsProcessingFeedback &feedback, Monitor &monitor );

} // namespace stillhead
