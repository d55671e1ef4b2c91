// SPDX-License-Identifier: GPL-2.0-or-later
// Comparisons that say what was got, what was wanted and by how much they differ. There is no global epsilon: every
// check names its own tolerance, in the unit of what it compares.
#pragma once

#include <QTest>

#include <cmath>
#include <cstring>

namespace stillhead::test
{

  inline QByteArray differenceText( const char *what, double actual, double expected, double allowed )
  {
    return QByteArray( what ) + " is " + QByteArray::number( actual, 'g', 17 ) + ", expected "
      + QByteArray::number( expected, 'g', 17 ) + ", off by " + QByteArray::number( actual - expected, 'g', 6 )
      + ", allowed " + QByteArray::number( allowed, 'g', 6 );
  }

  //! Equal to the bit; every NaN equals every NaN.
  inline bool sameBits( double a, double b )
  {
    return ( std::isnan( a ) && std::isnan( b ) ) || std::memcmp( &a, &b, sizeof a ) == 0;
  }

} // namespace stillhead::test

//! Fails unless \a actual lies within \a allowed of \a expected; NaN never does.
#define STILLHEAD_NEAR( actual, expected, allowed )                                                                    \
  do                                                                                                                   \
  {                                                                                                                    \
    const double nearActual = ( actual );                                                                              \
    const double nearExpected = ( expected );                                                                          \
    const double nearAllowed = ( allowed );                                                                            \
    QVERIFY2( std::abs( nearActual - nearExpected ) <= nearAllowed,                                                    \
      stillhead::test::differenceText( #actual, nearActual, nearExpected, nearAllowed ).constData() );                 \
  }                                                                                                                    \
  while ( false )

//! The same with a tolerance relative to \a expected.
#define STILLHEAD_NEAR_RELATIVE( actual, expected, allowed )                                                           \
  STILLHEAD_NEAR( actual, expected, std::abs( expected ) * ( allowed ) )

//! Fails unless both are the same double, or both NaN.
#define STILLHEAD_SAME( actual, expected )                                                                             \
  do                                                                                                                   \
  {                                                                                                                    \
    const double sameActual = ( actual );                                                                              \
    const double sameExpected = ( expected );                                                                          \
    QVERIFY2( stillhead::test::sameBits( sameActual, sameExpected ),                                                   \
      stillhead::test::differenceText( #actual, sameActual, sameExpected, 0.0 ).constData() );                         \
  }                                                                                                                    \
  while ( false )
