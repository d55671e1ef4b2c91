// SPDX-License-Identifier: GPL-2.0-or-later
// What a GeoPackage keeps beside the rows of a layer: its default style, in the table that the platform reads, and its
// metadata, by the standard's own extension.
#pragma once

#include <qgslayermetadata.h>

#include <QString>

#include <vector>

namespace stillhead
{

  struct LayerExtras
  {
      QString table;    //!< the layer's name in the file
      QString styleQml; //!< the default style, in the platform's own format
      QgsLayerMetadata metadata;
  };

  /**
   * Stores \a extras in the GeoPackage \a path, in one transaction; they take the place of what an earlier run stored.
   * \returns an error text, blank when all is well
   */
  QString storeExtras( const QString &path, const std::vector<LayerExtras> &extras );

} // namespace stillhead
