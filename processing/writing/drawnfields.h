// SPDX-License-Identifier: GPL-2.0-or-later
// The drawn features' own fields as they stand first in SPANS: both layers joined by field name, the key left out,
// and nothing lost to a clash of names. Names are compared without regard to case.
#pragma once

#include <qgsfeature.h>
#include <qgsfields.h>

#include <vector>

namespace stillhead
{

  //! The fields of one drawn layer, and which of them is its primary key (−1: none).
  struct DrawnLayerFields
  {
      QgsFields fields;
      QList<int> keys;
  };

  class DrawnFields
  {
    public:
      DrawnFields() = default;

      /**
       * \param layers mainlines first
       * \param reserved names of the fields that follow in the output
       */
      DrawnFields( const std::vector<DrawnLayerFields> &layers, const QStringList &reserved );

      const QgsFields &fields() const { return mFields; }

      //! The attributes of a feature of \a layer in the order and the types of fields(); null where its layer has no such field.
      QgsAttributes attributes( const QgsAttributes &drawn, std::size_t layer ) const;

      //! Fields kept under another name: "Length → Length_drawn".
      const QStringList &renamed() const { return mRenamed; }

    private:
      QgsFields mFields;
      std::vector<std::vector<int>> mTargets; //!< For each layer and field the field of the output, −1 for none
      QStringList mRenamed;
  };

} // namespace stillhead
