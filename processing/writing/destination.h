// SPDX-License-Identifier: GPL-2.0-or-later
// Where an output is to go, known before anything is created there: what format it is, whether something is there that a
// run would replace, and whether that is one of the run's own inputs.
#pragma once

#include "processing/reading/parametervalues.h"

class QgsMapLayer;

namespace stillhead
{

  class Destination
  {
    public:
      //! The destination that \a values give for the output \a name.
      Destination( const ParameterValues &values, const QString &name );

      //! False where the output was not asked for.
      bool isAsked() const { return mIsAsked; }

      //! The file, blank where the output goes to memory or a database.
      const QString &path() const { return mPath; }

      bool isGeoPackage() const;

      //! The layer in the file; blank where the output is the file itself.
      const QString &table() const { return mTable; }

      //! True where the output is a GeoPackage, or a layer of one, that nobody wants appended to: then we write it ourselves.
      bool isOwnGeoPackage() const { return isGeoPackage() && !mIsRemapped; }

      //! True where the format can hold Z and M that are no numbers.
      bool holdsGaps() const;

      //! True where the output would take the place of something, or may, before the run is through.
      bool replaces() const { return mReplaces; }

      /**
       * \throws QgsProcessingException where writing would destroy \a layer, an input
       */
      void refuseInput( const QgsMapLayer *layer, const QString &inputName ) const;

      //! \throws QgsProcessingException where the folder cannot be written to
      void refuseUnwritable() const;

      //! \throws QgsProcessingException where this output and \a other would be written over each other
      void refuseSamePlace( const Destination &other ) const;

      //! Takes away what a failed run has left where nothing was before.
      void remove() const;

    private:
      QString mName;
      QString mPath;
      QString mTable;
      bool mIsAsked = false;
      bool mIsMemory = false;
      bool mIsRemapped = false; //!< rows are to go into the fields of a layer that is there
      bool mFileWasThere = false;
      bool mReplaces = false;
  };

} // namespace stillhead
