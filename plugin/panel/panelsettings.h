// SPDX-License-Identifier: GPL-2.0-or-later
// What the panel is set to, as the project keeps it.
#pragma once

#include <QString>
#include <QVariantMap>

class QgsProject;

namespace stillhead
{

  struct PanelSettings
  {
      QString mains; //!< ids of layers
      QString laterals;
      QString terrain;
      QVariantMap parameters; //!< of the main algorithm, as texts

      bool operator==( const PanelSettings &other ) const
      {
        return mains == other.mains && laterals == other.laterals && terrain == other.terrain
          && parameters == other.parameters;
      }
  };

  //! Keeps \a settings in \a project, which then has something to save; nothing happens where they stand there already.
  void writeSettings( QgsProject &project, const PanelSettings &settings );

  //! What \a project keeps. \returns false where it keeps nothing
  bool readSettings( const QgsProject &project, PanelSettings &settings );

  /**
   * A first choice for a project that keeps nothing: lines and raster by their names, else the only ones there are. The units are
   * those chosen last in any project.
   */
  PanelSettings guessedSettings( const QgsProject &project );

  //! Remembers the units for projects to come.
  void rememberUnits( const QVariantMap &parameters );

} // namespace stillhead
