// SPDX-License-Identifier: GPL-2.0-or-later
// The terrain, and in which unit its heights are.
#pragma once

#include "plugin/panel/section.h"

#include <qgsrasterlayer.h>

class QgsMapLayerComboBox;

namespace stillhead
{

  struct Terrain;

  class GroundSection : public Section
  {
      Q_OBJECT

    public:
      GroundSection( const DisplayUnits &units, QWidget *parent );

      QgsRasterLayer *terrain() const;
      void setTerrain( QgsRasterLayer *terrain );

      //! Says what was found out about the terrain; null: nothing is known.
      void describe( const Terrain *terrain );

    private:
      QgsMapLayerComboBox *mTerrain;
      QLabel *mNote;
  };

} // namespace stillhead
