// SPDX-License-Identifier: GPL-2.0-or-later
// What is drawn: the layers of pipe, and how deep it lies.
#pragma once

#include "plugin/panel/section.h"

#include <qgsvectorlayer.h>

class QgsMapLayerComboBox;
class QCheckBox;

namespace stillhead
{

  class DrawingSection : public Section
  {
      Q_OBJECT

    public:
      DrawingSection( const DisplayUnits &units, QWidget *parent );

      QgsVectorLayer *mains() const;
      QgsVectorLayer *laterals() const;
      void setLayers( QgsVectorLayer *mains, QgsVectorLayer *laterals );

    protected:
      void fillMore( QVariantMap &parameters ) const override;
      void showMore( const QVariantMap &parameters ) override;

    private:
      QgsMapLayerComboBox *mMains;
      QgsMapLayerComboBox *mLaterals;
      QCheckBox *mUseLineZ;
  };

} // namespace stillhead
