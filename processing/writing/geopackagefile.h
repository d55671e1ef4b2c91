// SPDX-License-Identifier: GPL-2.0-or-later
// A GeoPackage under way: all layers that a run writes to one file, in one transaction, straight through GDAL. The
// platform's own writer opens the file anew for each layer, which costs more than the rows of a usual run. What was
// there before stays as it was until commit().
#pragma once

#include "processing/qgiscompat.h"

#include <qgscoordinatereferencesystem.h>
#include <qgsfeature.h>
#include <qgsfields.h>

#include <QString>

#include <memory>
#include <vector>

#include <gdal.h>
#include <ogr_api.h>

namespace stillhead
{

  class GeoPackageFile
  {
    public:
      /**
       * \param path the file, which need not be there
       * \param replacesFile true if what the file holds already goes away as a whole; else other layers stay
       */
      GeoPackageFile( const QString &path, bool replacesFile );

      //! What was not committed leaves no trace.
      ~GeoPackageFile();
      GeoPackageFile( const GeoPackageFile & ) = delete;
      GeoPackageFile &operator=( const GeoPackageFile & ) = delete;

      /**
       * Begins a layer, which takes the place of an earlier one of that name. \returns false where it cannot be made
       */
      bool beginLayer(
        const QString &name, const QgsFields &fields, compat::WkbType type, const QgsCoordinateReferenceSystem &crs );

      //! Adds rows to the layer begun last. \returns false where they cannot be written
      bool add( const QgsFeatureList &rows );

      //! Completes the layer begun last, its spatial index included. \returns false where that fails
      bool endLayer();

      //! Makes it all last. \returns false where that fails; then nothing of it is there
      bool commit();

      //! What GDAL said when something failed; may be blank.
      const QString &reason() const { return mReason; }

    private:
      struct CloseDataset
      {
          void operator()( void *dataset ) const { GDALClose( dataset ); }
      };

      bool open();
      void setField( OGRFeatureH row, int index, const QVariant &value ) const;

      QString mPath;
      QString mWorkingPath; //!< differs from mPath where a new file is made beside it first
      std::unique_ptr<void, CloseDataset> mDataset;
      OGRLayerH mLayer = nullptr;
      std::vector<OGRFieldType> mTypes; //!< of the fields of mLayer
      QString mReason;
  };

} // namespace stillhead
