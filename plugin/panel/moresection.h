// SPDX-License-Identifier: GPL-2.0-or-later
// What is seldom changed: how lines join, limits of laterals, errors of terrain and reading.
#pragma once

#include "plugin/panel/section.h"

class QCheckBox;

namespace stillhead
{

  class MoreSection : public Section
  {
      Q_OBJECT

    public:
      MoreSection( const DisplayUnits &units, QWidget *parent );

    protected:
      void fillMore( QVariantMap &parameters ) const override;
      void showMore( const QVariantMap &parameters ) override;

    private:
      QCheckBox *mJoinCrossings;
  };

} // namespace stillhead
