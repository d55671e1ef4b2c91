// SPDX-License-Identifier: GPL-2.0-or-later
// What every result layer keeps of its run: parameters, source and its note, terrain, constant, version, date, cautions.
#pragma once

#include <qgslayermetadata.h>

#include <QStringList>

namespace stillhead
{

  //! The facts of a run, in sentences that a reader of the layer understands years later.
  struct RunFacts
  {
      QString algorithm; //!< what was run, as users know it
      QString summary;   //!< may be blank
      QString source;
      QString sourceNote; //!< may be blank
      QString terrain;
      QString constant;
      QStringList parameters; //!< "NAME = value"
  };

  //! The parameters of a run as lines, outputs and blanks left out.
  QStringList parameterLines( const QVariantMap &parameters, const QStringList &leaveOut );

  //! The facts as lines, one fact each.
  QStringList factLines( const RunFacts &facts );

  //! The facts as metadata of the layer \a identifier, called \a title.
  QgsLayerMetadata resultMetadata( const RunFacts &facts, const QString &title, const QString &identifier );

} // namespace stillhead
