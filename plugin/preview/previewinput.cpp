// SPDX-License-Identifier: GPL-2.0-or-later
// Steps are asked for in the order in which a planner thinks: drawing, ground, water.
#include "plugin/preview/previewinput.h"

#include "processing/parameternames.h"

#include <QCoreApplication>

namespace stillhead
{

  namespace
  {

    class Step
    {
        Q_DECLARE_TR_FUNCTIONS( stillhead::PreviewInput )
    };

    bool isGiven( const QVariant &value )
    {
      return value.isValid() && !value.isNull() && !value.toString().isEmpty();
    }

    //! True for a layer that is there but whose file is gone.
    bool isBroken( const QgsMapLayer *layer )
    {
      return layer && !layer->isValid();
    }

  } // namespace

  QString PreviewInput::missing() const
  {
    if ( !mains )
      return Step::tr( "Choose the layer that mainlines are drawn in." );
    if ( isBroken( mains ) || isBroken( laterals ) || isBroken( terrain ) )
      return Step::tr( "A chosen layer has lost its file; mend it in the layer tree, or choose another." );
    if ( mains->featureCount() == 0 && !sketch )
      return Step::tr( "Draw the first mainline." );
    if ( !terrain )
      return Step::tr( "Choose the terrain: ground elevations as a raster." );
    if ( !isGiven( parameters.value( parameter::SOURCE ) ) )
      return Step::tr( "Pick where the water comes from." );
    if ( !isGiven( parameters.value( parameter::SOURCE_VALUE ) ) )
      return Step::tr( "Give the pressure or water level at the source." );
    return QString();
  }

  QVariantMap PreviewInput::algorithmParameters() const
  {
    QVariantMap all = parameters;
    all.insert( parameter::MAINS, mains ? mains->id() : QString() );
    if ( laterals )
      all.insert( parameter::LATERALS, laterals->id() );
    all.insert( parameter::TERRAIN, terrain ? terrain->id() : QString() );
    return all;
  }

} // namespace stillhead
