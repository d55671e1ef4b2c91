// SPDX-License-Identifier: GPL-2.0-or-later
// What a style needs to know of a run: the limits in the chosen units and the names of those units. Styles are made
// from this alone and from what the layer holds, so the desktop, the stored style and the printed map agree.
#pragma once

#include <QString>
#include <QVector>

class QgsMapLayer;
class QgsRasterLayer;
class QgsVectorLayer;

namespace stillhead
{

  class DisplayUnits;
  struct Limits;

  struct ResultStyle
  {
      QVector<double> bandLimits; //!< rising, in the pressure unit; band 0 lies below the first
      double least = 0.0;
      double most = 0.0;
      double lateralLeast = 0.0;
      double lateralMost = 0.0;
      QString pressureUnit; //!< as it stands behind a number: `psi`, `m of water`
      QString lengthUnit;   //!< `ft`, `m`

      int bandCount() const { return static_cast<int>( bandLimits.size() ) + 1; }
  };

  //! The limits of a run in the units of its user.
  ResultStyle resultStyle( const Limits &limits, const DisplayUnits &units );

  //! The outputs that carry a style.
  enum class ResultLayer
  {
    Spans,
    Nodes,
    Stretches,
    Extremes,
    Findings,
    Surface,
    BandAreas,
    GroundLimits,
    Regulators,
    Boosters,
    Comparison
  };

  //! A band in plain words with its unit: `under 30 psi`, `65 to 80 psi`, `100 psi and over`.
  QString bandText( int band, const ResultStyle &style );

  //! The caution on pressure at rest in short lines, as it stands under a legend.
  QString legendCaution();

  void styleSpans( QgsVectorLayer &layer, const ResultStyle &style );
  void styleNodes( QgsVectorLayer &layer, const ResultStyle &style );
  void styleStretches( QgsVectorLayer &layer, const ResultStyle &style );
  void styleExtremes( QgsVectorLayer &layer, const ResultStyle &style );
  void styleFindings( QgsVectorLayer &layer, const ResultStyle &style );
  void styleSurface( QgsRasterLayer &layer, const ResultStyle &style );
  void styleRegulators( QgsVectorLayer &layer, const ResultStyle &style );
  void styleBoosters( QgsVectorLayer &layer, const ResultStyle &style );
  void styleComparison( QgsVectorLayer &layer );
  void styleBandAreas( QgsVectorLayer &layer, const ResultStyle &style );
  void styleGroundLimits( QgsVectorLayer &layer, const ResultStyle &style );

  //! Gives \a layer the style of an output: renderer, labels, field aliases and legend.
  void styleResult( QgsMapLayer &layer, ResultLayer what, const ResultStyle &style );

} // namespace stillhead
