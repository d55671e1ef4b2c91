// SPDX-License-Identifier: GPL-2.0-or-later
// Findings by shape, none by colour. The legend has those that the layer holds; a near miss is labelled with its gap.
#include "core/plan/finding.h"
#include "processing/parameternames.h"
#include "processing/styles/labels.h"
#include "processing/styles/resultstyle.h"
#include "processing/styles/symbols.h"
#include "processing/text/text.h"

#include <qgscategorizedsymbolrenderer.h>
#include <qgsmarkersymbollayer.h>
#include <qgsvectorlayer.h>

namespace stillhead
{

  namespace
  {

    using Shape = compat::MarkerShape;
    using Layers = QList<QgsSymbolLayer *>;

    const QColor DARK = Qt::black;
    const QColor WHITE = Qt::white;

    //! A letter in a ring, for what has no shape of its own.
    Layers letter( const QString &character )
    {
      return { shapeLayer( Shape::Circle, 4.2, WHITE, DARK, 0.3 ),
        new QgsFontMarkerSymbolLayer( QStringLiteral( "DejaVu Sans" ), character, 2.8, DARK ) };
    }

    //! A line shape on a white rim, so that it shows on dark pipe.
    Layers rimmed( Shape shape, double sizeMm, double angle )
    {
      QgsSimpleMarkerSymbolLayer *rim = shapeLayer( shape, sizeMm, WHITE, WHITE, 1.4 );
      QgsSimpleMarkerSymbolLayer *line = shapeLayer( shape, sizeMm, DARK, DARK, 0.6 );
      rim->setAngle( angle );
      line->setAngle( angle );
      return { rim, line };
    }

    //! Moved off its place, where another symbol often stands (the worst place of a summit, a finding on the way).
    Layers movedOff( const Layers &layers, double xMm, double yMm )
    {
      for ( QgsSymbolLayer *layer : layers )
        static_cast<QgsMarkerSymbolLayer *>( layer )->setOffset( QPointF( xMm, yMm ) );
      return layers;
    }

    //! A shape for each code that core gives.
    struct Look
    {
        FindingCode code;
        Layers layers;
    };

    // The arrow head is turned by a quarter, and its offset with it.
    QList<Look> looks()
    {
      return {
        { FindingCode::NearMiss,
          { shapeLayer( Shape::Square, 3.6, Qt::transparent, WHITE, 1.2 ),
            shapeLayer( Shape::Square, 3.6, Qt::transparent, DARK, 0.5 ) } },
        { FindingCode::CrossingNotJoined, rimmed( Shape::HalfArc, 4.6, 0.0 ) },
        { FindingCode::NoSource, rimmed( Shape::Cross2, 3.0, 0.0 ) },
        { FindingCode::NoTerrain, letter( QStringLiteral( "?" ) ) },
        { FindingCode::Summit, movedOff( rimmed( Shape::ArrowHead, 3.6, -90.0 ), 2.2, 0.0 ) },
        { FindingCode::SummitUnknown, movedOff( letter( QStringLiteral( "^" ) ), 5.0, 0.0 ) },
        { FindingCode::SystemsTouch, { shapeLayer( Shape::Diamond, 4.0, WHITE, DARK, 0.5 ) } },
        { FindingCode::Duplicate, letter( QStringLiteral( "2" ) ) },
        { FindingCode::NoLength, letter( QStringLiteral( "0" ) ) },
        { FindingCode::NoSurveyZ, letter( QStringLiteral( "Z" ) ) },
        { FindingCode::OneReading, letter( QStringLiteral( "1" ) ) },
        { FindingCode::UnusualPressure, letter( QStringLiteral( "!" ) ) },
        { FindingCode::PumpDutyNotGiven, letter( QStringLiteral( "P" ) ) },
        { FindingCode::LevelsDiffer, letter( QStringLiteral( "≠" ) ) },
        { FindingCode::DeviceOffTheLine, letter( QStringLiteral( "D" ) ) },
        { FindingCode::DeviceAtAJoint, letter( QStringLiteral( "J" ) ) },
        { FindingCode::RegulatorWideOpen, movedOff( letter( QStringLiteral( "O" ) ), 5.0, 0.0 ) },
        { FindingCode::RegulatorShortOfDifferential, movedOff( letter( QStringLiteral( "d" ) ), 5.0, 0.0 ) },
        { FindingCode::RegulatorBypassed, movedOff( letter( QStringLiteral( "B" ) ), 5.0, 0.0 ) },
        { FindingCode::RegulatorHeldShut, movedOff( letter( QStringLiteral( "S" ) ), -5.0, 0.0 ) },
        { FindingCode::PressureMayBeTrapped, movedOff( letter( QStringLiteral( "T" ) ), 5.0, 0.0 ) },
        { FindingCode::CannotBeMended, letter( QStringLiteral( "X" ) ) },
      };
    }

  } // namespace

  void styleFindings( QgsVectorLayer &layer, const ResultStyle &style )
  {
    const QSet<QVariant> present = layer.uniqueValues( layer.fields().lookupField( field::FINDING ) );
    QgsCategoryList categories;
    const QList<Look> all = looks();
    for ( const Look &look : all )
    {
      const QString code = QString::fromLatin1( findingName( look.code ) );
      std::unique_ptr<QgsMarkerSymbol> symbol = markerSymbol( look.layers );
      if ( present.contains( code ) )
        categories << QgsRendererCategory( code, symbol.release(), code );
    }
    layer.setRenderer( new QgsCategorizedSymbolRenderer( field::FINDING, categories ) );
    labelPoints( layer,
      QStringLiteral( "CASE WHEN \"gap\" IS NOT NULL THEN "
                      "\"finding\" || ', ' || format_number( \"gap\", 1 ) || ' %1' END" )
        .arg( style.lengthUnit ) );
  }

} // namespace stillhead
