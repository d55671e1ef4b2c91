// SPDX-License-Identifier: GPL-2.0-or-later
// Layers are followed by the boxes themselves when they come, go or are renamed.
#include "plugin/panel/drawingsection.h"

#include "plugin/panel/parametertexts.h"
#include "processing/parameternames.h"
#include "processing/qgiscompat.h"

#include <qgsmaplayercombobox.h>

#include <QCheckBox>
#include <QSignalBlocker>

namespace stillhead
{

  namespace
  {

    QgsMapLayerComboBox *lineLayerBox( const QString &name, QWidget *parent )
    {
      auto *box = new QgsMapLayerComboBox( parent );
      box->setFilters( compat::LayerFilter::LineLayer );
      box->setAllowEmptyLayer( true );
      box->setSizeAdjustPolicy( QComboBox::AdjustToMinimumContentsLengthWithIcon );
      box->setMinimumContentsLength( 8 );
      box->setLayer( nullptr );
      explain( box, name );
      return box;
    }

  } // namespace

  DrawingSection::DrawingSection( const DisplayUnits &units, QWidget *parent )
    : Section( tr( "Drawing" ), units, parent )
    , mMains( lineLayerBox( parameter::MAINS, this ) )
    , mLaterals( lineLayerBox( parameter::LATERALS, this ) )
    , mUseLineZ( new QCheckBox( tr( "Lines carry surveyed &Z" ), this ) )
  {
    addRow( tr( "&Mainlines" ), mMains );
    addRow( tr( "&Laterals" ), mLaterals );
    addQuantity( tr( "Depth of co&ver" ), parameter::COVER, QuantityEdit::Quantity::Length );
    explain( mUseLineZ, parameter::USE_LINE_Z );
    addRow( QString(), mUseLineZ );
    mUseLineZ->setAccessibleName( tr( "Lines carry surveyed Z" ) );
    connect( mMains, &QgsMapLayerComboBox::layerChanged, this, &Section::edited );
    connect( mLaterals, &QgsMapLayerComboBox::layerChanged, this, &Section::edited );
    connect( mUseLineZ, &QCheckBox::clicked, this, &Section::edited );
  }

  QgsVectorLayer *DrawingSection::mains() const
  {
    return qobject_cast<QgsVectorLayer *>( mMains->currentLayer() );
  }

  QgsVectorLayer *DrawingSection::laterals() const
  {
    return qobject_cast<QgsVectorLayer *>( mLaterals->currentLayer() );
  }

  void DrawingSection::setLayers( QgsVectorLayer *mains, QgsVectorLayer *laterals )
  {
    const QSignalBlocker quietMains( mMains );
    const QSignalBlocker quietLaterals( mLaterals );
    mMains->setLayer( mains );
    mLaterals->setLayer( laterals );
  }

  void DrawingSection::fillMore( QVariantMap &parameters ) const
  {
    if ( mUseLineZ->isChecked() )
      parameters.insert( parameter::USE_LINE_Z, QStringLiteral( "true" ) );
  }

  void DrawingSection::showMore( const QVariantMap &parameters )
  {
    mUseLineZ->setChecked( parameters.value( parameter::USE_LINE_Z ).toBool() );
  }

} // namespace stillhead
