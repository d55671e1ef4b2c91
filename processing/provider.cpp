// SPDX-License-Identifier: GPL-2.0-or-later
// Names the provider and lists its algorithms. A new algorithm is added to algorithmList() and nowhere else.
#include "processing/provider.h"

#include "core/version.h"
#include "processing/newplan/newplanalgorithm.h"
#include "processing/pressuresurfacealgorithm.h"
#include "processing/staticpressurealgorithm.h"

#include <qgsprocessingalgorithm.h>

#include <QIcon>

namespace stillhead
{

  namespace
  {

    //! Every algorithm of the provider, in the order in which the toolbox shows them.
    QList<QgsProcessingAlgorithm *> algorithmList()
    {
      return { new StaticPressureAlgorithm(), new PressureSurfaceAlgorithm(), new NewPlanAlgorithm() };
    }

  } // namespace

  Provider::Provider( QObject *parent )
    : QgsProcessingProvider( parent )
  {
  }

  QString Provider::providerId()
  {
    return QStringLiteral( "stillhead" );
  }

  QString Provider::id() const
  {
    return providerId();
  }

  QString Provider::name() const
  {
    return QStringLiteral( "Stillhead" );
  }

  QString Provider::longName() const
  {
    return tr( "Stillhead: static pressure along irrigation pipe" );
  }

  QString Provider::helpId() const
  {
    return providerId();
  }

  QIcon Provider::icon() const
  {
    return QIcon( svgIconPath() );
  }

  QString Provider::svgIconPath() const
  {
    return QStringLiteral( ":/stillhead/stillhead.svg" );
  }

  QString Provider::versionInfo() const
  {
    return QString::fromLatin1( versionText() );
  }

  compat::ProviderFlags Provider::flags() const
  {
    return compat::readsVirtualRasters();
  }

  void Provider::loadAlgorithms()
  {
    const QList<QgsProcessingAlgorithm *> algorithms = algorithmList();
    for ( QgsProcessingAlgorithm *algorithm : algorithms )
      addAlgorithm( algorithm );
  }

} // namespace stillhead
