// SPDX-License-Identifier: GPL-2.0-or-later
// The colours and casing widths of the pressure bands: light and narrow for low pressure, dark and wide for high, so
// that lightness and width carry the order without hue. Our own ramp. How it was checked, and is again on every run
// (tests/processing/styles/testpalette.cpp): lightness L* is 84, 72, 61, 50, 38, 20, steps of 10 or more in grey print;
// as simulated for protan, deutan and tritan sight the nearest two bands stay 11.9 apart (CIE 1976), 15.6 in normal sight.
#pragma once

#include <QColor>
#include <QVector>

namespace stillhead
{

  //! One colour for each of \a bands, light to dark: of the ramp's six if there are no more, else mixed between them.
  QVector<QColor> bandColors( int bands );

  //! Casing widths in millimetres for each of \a bands, rising in even steps.
  QVector<double> casingWidths( int bands );

  //! CIE lightness L* of an sRGB colour, 0 to 100.
  double lightness( const QColor &color );

  //! Colour of the pipe line on a casing: black, or white where black would vanish.
  QColor pipeColorOn( const QColor &casing );

  //! Edge of casings and marks, so that light bands show on white paper.
  QColor edgeColor();

} // namespace stillhead
