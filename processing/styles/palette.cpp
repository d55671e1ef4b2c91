// SPDX-License-Identifier: GPL-2.0-or-later
// Picks from the six-step ramp for few bands and mixes in linear light for many; lightness by the CIE formula.
#include "processing/styles/palette.h"

#include <algorithm>
#include <array>
#include <cmath>

namespace stillhead
{

  namespace
  {

    constexpr std::array<QRgb, 6> RAMP = { 0xffe8cf7e, 0xffb5b36a, 0xff7d9c7e, 0xff4b7f8c, 0xff2c5c85, 0xff17305e };
    constexpr double NARROWEST_MM = 1.2;
    constexpr double WIDEST_MM = 2.6;
    constexpr double DARK_LIGHTNESS = 45.0;

    // sRGB transfer curve, IEC 61966-2-1.
    double toLinear( double channel )
    {
      return channel <= 0.04045 ? channel / 12.92 : std::pow( ( channel + 0.055 ) / 1.055, 2.4 );
    }

    double fromLinear( double channel )
    {
      return channel <= 0.0031308 ? channel * 12.92 : 1.055 * std::pow( channel, 1.0 / 2.4 ) - 0.055;
    }

    double mixed( double a, double b, double share )
    {
      return fromLinear( toLinear( a ) * ( 1.0 - share ) + toLinear( b ) * share );
    }

    //! The place of band \a index among \a bands on a scale from 0 to 1.
    double placeOf( int index, int bands )
    {
      return bands > 1 ? static_cast<double>( index ) / ( bands - 1 ) : 0.5;
    }

    QColor rampColor( double place )
    {
      const double position = place * static_cast<double>( RAMP.size() - 1 );
      const size_t below = std::min( static_cast<size_t>( position ), RAMP.size() - 2 );
      const double share = position - static_cast<double>( below );
      const QColor a = QColor::fromRgb( RAMP[below] );
      const QColor b = QColor::fromRgb( RAMP[below + 1] );
      return QColor::fromRgbF( mixed( a.redF(), b.redF(), share ), mixed( a.greenF(), b.greenF(), share ),
        mixed( a.blueF(), b.blueF(), share ) );
    }

  } // namespace

  QVector<QColor> bandColors( int bands )
  {
    const bool enough = bands <= static_cast<int>( RAMP.size() );
    QVector<QColor> colors;
    for ( int index = 0; index < bands; ++index )
    {
      const double place = placeOf( index, bands );
      // Steps of the ramp itself are farther apart than mixed ones.
      const double position = std::round( place * static_cast<double>( RAMP.size() - 1 ) );
      colors << ( enough ? QColor::fromRgb( RAMP[static_cast<size_t>( position )] ) : rampColor( place ) );
    }
    return colors;
  }

  QVector<double> casingWidths( int bands )
  {
    QVector<double> widths;
    for ( int index = 0; index < bands; ++index )
      widths << NARROWEST_MM + ( WIDEST_MM - NARROWEST_MM ) * placeOf( index, bands );
    return widths;
  }

  double lightness( const QColor &color )
  {
    const double luminance = 0.2126729 * toLinear( color.redF() ) + 0.7151522 * toLinear( color.greenF() )
      + 0.0721750 * toLinear( color.blueF() );
    return luminance > 216.0 / 24389.0 ? 116.0 * std::cbrt( luminance ) - 16.0 : luminance * 24389.0 / 27.0;
  }

  QColor pipeColorOn( const QColor &casing )
  {
    return lightness( casing ) < DARK_LIGHTNESS ? QColor( Qt::white ) : QColor( Qt::black );
  }

  QColor edgeColor()
  {
    return QColor( 0x40, 0x40, 0x40 );
  }

} // namespace stillhead
