// SPDX-License-Identifier: GPL-2.0-or-later
// The Processing provider: its id, name, icon and the list of its algorithms.
#pragma once

#include "processing/qgiscompat.h"

#include <qgsprocessingprovider.h>

namespace stillhead
{

  class Provider : public QgsProcessingProvider
  {
      Q_OBJECT

    public:
      explicit Provider( QObject *parent = nullptr );

      //! The provider's id, the part before the colon of every algorithm id. Never changes.
      static QString providerId();

      QString id() const override;
      QString name() const override;
      QString longName() const override;
      QString helpId() const override;
      QIcon icon() const override;
      QString svgIconPath() const override;
      QString versionInfo() const override;
      compat::ProviderFlags flags() const override;

    protected:
      void loadAlgorithms() override;
  };

} // namespace stillhead
