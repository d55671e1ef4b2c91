// SPDX-License-Identifier: GPL-2.0-or-later
// Saves results as layers by running the algorithm itself, in the background, into one GeoPackage; the layers come into
// the project as a group, in the styles that the algorithm stored with them.
#pragma once

#include "plugin/preview/previewinput.h"

#include <QObject>

#include <memory>

class QgsProject;

namespace stillhead
{

  class SaveResults : public QObject
  {
      Q_OBJECT

    public:
      //! Begins to save what \a input gives into the GeoPackage \a path.
      SaveResults( const PreviewInput &input, const QString &path, QgsProject *project, QObject *parent );
    signals:
      //! It is done; \a problem is blank when all is well.
      void done( const QString &path, const QString &problem );

    private:
      void finish( bool succeeded, const QVariantMap &results );
      void load( const QVariantMap &results );

      class Run;

      QString mPath;
      QgsProject *mProject;
      std::shared_ptr<Run> mRun;
  };

} // namespace stillhead
