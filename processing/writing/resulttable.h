// SPDX-License-Identifier: GPL-2.0-or-later
// An output layer before it is written: its fields and a way to make its rows, range by range on any thread.
#pragma once

#include "core/job/staticjob.h"
#include "core/judgement/limits.h"
#include "processing/displayunits.h"
#include "processing/qgiscompat.h"
#include "processing/reading/drawingreader.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/storedstyle.h"
#include "processing/text/findingtext.h"

#include <qgsfeature.h>

#include <functional>
#include <vector>

namespace stillhead
{

  struct ResultTable
  {
      QString output; //!< name of the sink
      ResultLayer what = ResultLayer::Spans;
      QgsFields fields;
      compat::WkbType type = compat::WkbType::NoGeometry;
      std::size_t rows = 0;
      //! Fills features[0, last − first) with the rows [first, last).
      std::function<void( std::size_t first, std::size_t last, QgsFeature *features )> make;
      LegendValues legend;
      //! Some Z or M is not a number, which not every format can hold.
      bool hasGaps = false;
  };

  //! Everything that the tables of a run are made from; it outlives them.
  struct ResultContext
  {
      const StaticResult &result;
      const DrawnInput &drawn;
      const PlanMeasure &measure;
      const DisplayUnits &units;
      const Limits &limits;
      const FeedNames &names;
      const ResultStyle &style;
      double metresPerZ; //!< of the terrain: the unit of Z in geometries

      const CanonicalLine &lineOf( const Piece &piece ) const
      {
        const Span &span = result.network.spans[static_cast<std::size_t>( piece.span )];
        return result.drawing.lines[static_cast<std::size_t>( span.line )];
      }

      const DrawnFeature &featureOf( const CanonicalLine &line ) const
      {
        const DrawnLine &drawnLine = drawn.drawing.lines[static_cast<std::size_t>( line.drawn )];
        return drawn.features[static_cast<std::size_t>( drawnLine.feature )];
      }

      //! M of a geometry.
      double pressure( double pascals ) const { return units.pressure( pascals ); }

      //! Z of a geometry.
      double z( double elevationM ) const { return elevationM / metresPerZ; }
  };

  //! Number of something counted from 0 as users see it; null for none.
  inline QVariant oneBased( int number )
  {
    return number < 0 ? QVariant() : QVariant( number + 1 );
  }

  //! A point with Z and M that stays one although they may be no numbers.
  QgsGeometry pointZM( const PlanPoint &place, double z, double m );

  //! A row of NODES: a node, and the device that stands there (−1: none; index into StaticResult::devices).
  struct NodeRow
  {
      int node = -1;
      int device = -1;
  };

  //! A device that passes water is one row, its outlet's; a closed valve two, one a side.
  std::vector<NodeRow> nodeRows( const StaticResult &result );

  /**
   * For every line as drawn the length of the feature's parts before it: where a line begins, counted from the start of
   * its feature.
   */
  std::vector<double> partStartsM( const ResultContext &context );

  ResultTable spanTable( const ResultContext &context );
  ResultTable nodeTable( const ResultContext &context );

  //! \param outlines the polygons of the stretches; they outlive the table
  ResultTable stretchTable( const ResultContext &context, const std::vector<QgsGeometry> &outlines );

  ResultTable extremeTable( const ResultContext &context );
  ResultTable findingTable( const ResultContext &context );

  //! Names of the fields that follow the drawn ones in SPANS.
  QStringList spanFieldNames();

  //! "95 psi, pipe 348 ft"; with a decimal more where the pressure lies so near to \a limitPa that whole units would hide on which side.
  QString placeLabel( double pressurePa, double elevationM, const DisplayUnits &units, double leastPa, double mostPa );

} // namespace stillhead
