// SPDX-License-Identifier: GPL-2.0-or-later
// The area around lines in a plane of metres. Many lines are widened cell by cell and glued: widening thousands at once
// costs many times as much, and on one thread only.
#pragma once

#include "processing/writing/cellgrid.h"

#include <qgsgeometry.h>

#include <QVector>

#include <cstddef>
#include <optional>
#include <utility>
#include <vector>

namespace stillhead
{

  //! A line in a plane of metres.
  struct Strand
  {
      QVector<double> x;
      QVector<double> y;
  };

  //! What lies within a distance of lines that hang together.
  class PipeArea
  {
    public:
      PipeArea( std::vector<Strand> strands, double distanceM );

      std::size_t parts() const { return mParts.size(); }

      //! Widens one part; several threads may widen different ones.
      void widen( std::size_t part );

      //! The area, once all parts are widened.
      QgsGeometry whole();

    private:
      void cut( const std::vector<Strand> &strands, double sideM );

      double mDistanceM;
      double mCellSideM = 0.0;
      std::vector<Strand> mStrands; //!< as given
      CellGrid mGrid;
      std::vector<Strand> mPieces; //!< the strands, cut so that each lies in few cells
      std::vector<std::pair<CellIndex, std::vector<std::size_t>>> mCells; //!< with the pieces that reach into them
      std::vector<QgsGeometry> mParts;
  };

} // namespace stillhead
