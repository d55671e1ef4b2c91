// SPDX-License-Identifier: GPL-2.0-or-later
// The outputs of one run: asked about before the work, created after it, written one by one. A run that fails or is cancelled
// while writing takes away what it has made; where something earlier was replaced already, it is finished instead.
// GeoPackages are replaced by commit(), all others as they are written.
#pragma once

#include "core/feedback/monitor.h"
#include "processing/writing/destination.h"
#include "processing/writing/geopackagefile.h"
#include "processing/writing/resulttable.h"
#include "processing/writing/rowspool.h"

#include <qgsprocessingfeedback.h>

#include <map>
#include <memory>
#include <vector>

namespace stillhead
{

  class OutputSet
  {
    public:
      //! \param names the outputs that the algorithm has, rasters included
      OutputSet( const ParameterValues &values, const QStringList &names );
      ~OutputSet();
      OutputSet( const OutputSet & ) = delete;
      OutputSet &operator=( const OutputSet & ) = delete;

      bool isAsked( const QString &name ) const { return mDestinations.at( name ).isAsked(); }

      //! The GeoPackage that the output \a name is a layer of; blank where it goes elsewhere.
      QString geoPackageOf( const QString &name ) const;

      /**
       * Checks that no destination is an input and that all can be written.
       * \throws QgsProcessingException
       */
      void check( const std::map<QString, const QgsMapLayer *> &inputs ) const;

      //! \throws QgsProcessingException where a table has gaps that its format cannot hold. Nothing is created yet.
      void checkFormats( const std::vector<ResultTable> &tables ) const;

      /**
       * Writes \a table.
       * \returns the id of the layer, as results and models know it
       * \throws QgsProcessingException, Cancelled
       */
      QString write( const ResultTable &table, const QgsCoordinateReferenceSystem &crs, QgsProcessingFeedback &feedback,
        double fromPercent, double toPercent );

      /**
       * Writes rows that were made beforehand.
       * \returns the id of the layer
       * \throws QgsProcessingException, Cancelled
       */
      QString writeSpool( const QString &output, const QgsFields &fields, compat::WkbType type,
        const QgsCoordinateReferenceSystem &crs, RowSpool &spool, Monitor &monitor );

      //! Says that the output \a name, which somebody else writes, is there from now on.
      void noteWritten( const QString &name ) { mWritten.push_back( name ); }

      //! True where something earlier goes away as soon as its output is written.
      bool replacesAtOnce() const { return mReplaces; }

      //! All is written and stays. \throws QgsProcessingException where a file cannot be completed
      void commit();

    private:
      class Rows;

      GeoPackageFile &fileFor( const Destination &destination );
      QString idOf( const QString &name ) const;
      void loadOnCompletion( const QString &name, const QString &id ) const;

      const ParameterValues &mValues;
      std::map<QString, Destination> mDestinations;
      bool mReplaces = false;
      std::map<QString, std::unique_ptr<GeoPackageFile>> mFiles; //!< by path
      std::vector<QString> mWritten;                             //!< all but layers of mFiles
  };

} // namespace stillhead
