// SPDX-License-Identifier: GPL-2.0-or-later
// The rows of one output of a result as a list shows them: the values that the algorithm would write, and where to look.
#pragma once

#include "processing/solvedplan.h"

#include <qgsgeometry.h>

#include <QStringList>
#include <QVariant>
#include <QVector>

namespace stillhead
{

  struct ResultRow
  {
      QVariantList values;
      QgsGeometry place; //!< in the CRS of the mainlines; null where there is none
  };

  struct ResultList
  {
      QStringList headings; //!< with units
      QVector<ResultRow> rows;
  };

  //! Worst places, summits and sags.
  ResultList placeList( const SolvedPlan &plan );

  //! Stretches over or short, each with all its pipe as its place.
  ResultList stretchList( const SolvedPlan &plan );

  ResultList findingList( const SolvedPlan &plan );

} // namespace stillhead
