// SPDX-License-Identifier: GPL-2.0-or-later
// Hand-made results of a run, one piece of pipe for every band and every state, for tests of styles: no figure in them is
// computed. Places are metres on an invented plane.
#pragma once

#include "processing/styles/palette.h"
#include "processing/styles/resultstyle.h"
#include "tests/support/processingrun.h"

namespace stillhead::test
{

  class StyleSample
  {
    public:
      ResultStyle style() const
      {
        ResultStyle style;
        style.bandLimits = { 30, 45, 60, 80, 100 };
        style.least = style.lateralLeast = 30;
        style.most = style.lateralMost = 80;
        style.pressureUnit = QStringLiteral( "psi" );
        style.lengthUnit = QStringLiteral( "ft" );
        return style;
      }

      QVector<QColor> colors() const { return bandColors( style().bandCount() ); }

      //! A row of pipes, west to east: a mainline and a lateral of each band, then one of each state and a close call.
      LayerPointer spans() const
      {
        std::vector<Drawn> pieces;
        for ( int band = 0; band < 6; ++band )
        {
          const QString state = band < 4 ? QStringLiteral( "within limits" ) : QStringLiteral( "over limit" );
          pieces.push_back( piece( 10 * band, 0, QStringLiteral( "mainline" ), band, state, false ) );
          pieces.push_back( piece( 10 * band, 40, QStringLiteral( "lateral" ), band, state, false ) );
        }
        int column = 6;
        for ( const char *state : { "under limit", "over and under", "above static level", "past a summit" } )
        {
          const int band = column == 7 ? 5 : 1;
          pieces.push_back(
            piece( 10 * column, 0, QStringLiteral( "mainline" ), band, QString::fromLatin1( state ), false ) );
          pieces.push_back(
            piece( 10 * column++, 40, QStringLiteral( "lateral" ), band, QString::fromLatin1( state ), false ) );
        }
        for ( const char *state : { "no terrain", "no source" } )
        {
          pieces.push_back(
            piece( 10 * column, 0, QStringLiteral( "mainline" ), -1, QString::fromLatin1( state ), false ) );
          pieces.push_back(
            piece( 10 * column++, 40, QStringLiteral( "lateral" ), -1, QString::fromLatin1( state ), false ) );
        }
        pieces.push_back(
          piece( 10 * column, 0, QStringLiteral( "mainline" ), 3, QStringLiteral( "within limits" ), true ) );
        pieces.push_back(
          piece( 10 * column, 40, QStringLiteral( "lateral" ), 4, QStringLiteral( "over limit" ), true ) );
        return drawLayer( definition(), pieces, QStringLiteral( "spans" ) );
      }

      LayerPointer spansInState( const QString &state ) const
      {
        return drawLayer(
          definition(), { piece( 0, 0, QStringLiteral( "mainline" ), 2, state, false ) }, QStringLiteral( "spans" ) );
      }

      LayerPointer nodes() const
      {
        return drawLayer( QStringLiteral( "Point?crs=EPSG:32631&field=kind:string" ),
          { { QStringLiteral( "POINT(0 90)" ), { QStringLiteral( "source" ) } },
            { QStringLiteral( "POINT(10 90)" ), { QStringLiteral( "joint" ) } },
            { QStringLiteral( "POINT(20 90)" ), { QStringLiteral( "end" ) } } },
          QStringLiteral( "nodes" ) );
      }

      LayerPointer findings() const
      {
        return drawLayer( QStringLiteral( "Point?crs=EPSG:32631&field=finding:string&field=gap:double" ),
          { { QStringLiteral( "POINT(40 90)" ), { QStringLiteral( "crossing not joined" ), QVariant() } },
            { QStringLiteral( "POINT(50 90)" ), { QStringLiteral( "near miss" ), 1.3 } } },
          QStringLiteral( "findings" ) );
      }

      LayerPointer extremes() const
      {
        return drawLayer(
          QStringLiteral( "Point?crs=EPSG:32631&field=what:string&field=stretch:integer&field=label:string" ),
          { { QStringLiteral( "POINT(70 90)" ),
              { QStringLiteral( "highest" ), 1, QStringLiteral( "95 psi, pipe 348 ft" ) } },
            { QStringLiteral( "POINT(80 90)" ),
              { QStringLiteral( "lowest" ), 2, QStringLiteral( "25 psi, pipe 488 ft" ) } },
            { QStringLiteral( "POINT(90 90)" ), { QStringLiteral( "highest" ), QVariant(), QString() } },
            { QStringLiteral( "POINT(100 90)" ), { QStringLiteral( "lowest" ), QVariant(), QString() } },
            { QStringLiteral( "POINT(110 90)" ),
              { QStringLiteral( "summit" ), QVariant(), QStringLiteral( "summit" ) } },
            { QStringLiteral( "POINT(120 90)" ), { QStringLiteral( "sag" ), QVariant(), QStringLiteral( "sag" ) } } },
          QStringLiteral( "extremes" ) );
      }

      //! A ceiling and a floor, both with the higher ground in the north.
      LayerPointer groundLimits() const
      {
        return drawLayer( QStringLiteral( "LineString?crs=EPSG:32631&field=what:string&field=label:string" ),
          { { QStringLiteral( "LINESTRING(0 79, 30 80, 55 79)" ),
              { QStringLiteral( "ceiling" ), QStringLiteral( "ceiling, 30 psi, ground 477 ft" ) } },
            { QStringLiteral( "LINESTRING(65 79, 95 80, 120 79)" ),
              { QStringLiteral( "floor" ), QStringLiteral( "floor, 80 psi, ground 382 ft" ) } } },
          QStringLiteral( "limits" ) );
      }

      LayerPointer stretches() const
      {
        return drawLayer( QStringLiteral( "Polygon?crs=EPSG:32631&field=what:string" ),
          { { QStringLiteral( "POLYGON((37 -3, 53 -3, 53 33, 37 33, 37 -3))" ), { QStringLiteral( "over" ) } },
            { QStringLiteral( "POLYGON((57 -3, 63 -3, 63 33, 57 33, 57 -3))" ), { QStringLiteral( "short" ) } } },
          QStringLiteral( "stretches" ) );
      }

    private:
      static QString definition()
      {
        return QStringLiteral( "LineString?crs=EPSG:32631&field=role:string&field=length:double&field=p_low:double&"
                               "field=p_high:double&field=band:integer&field=state:string&field=doubt:double&"
                               "field=close_call:bool" );
      }

      static Drawn piece( int x, int y, const QString &role, int band, const QString &state, bool closeCall )
      {
        Drawn drawn;
        drawn.wkt = QStringLiteral( "LINESTRING(%1 %2, %1 %3)" ).arg( x ).arg( y ).arg( y + 30 );
        drawn.attributes = { role, 30.0, QVariant(), QVariant(), band < 0 ? QVariant() : QVariant( band ), state, 1.0,
          closeCall };
        return drawn;
      }
  };

} // namespace stillhead::test
