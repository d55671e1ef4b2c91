// SPDX-License-Identifier: GPL-2.0-or-later
// The translation context of everything that users read and that is no contract name.
#pragma once

#include <QCoreApplication>

namespace stillhead
{

  class Text
  {
      Q_DECLARE_TR_FUNCTIONS( Stillhead )
  };

} // namespace stillhead
