// SPDX-License-Identifier: GPL-2.0-or-later
// One table of names per output. A field stands in its unit everywhere, so the unit is part of the name.
#include "processing/styles/fieldaliases.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

#include <qgsvectorlayer.h>

#include <QMap>

namespace stillhead
{

  namespace
  {

    //! %1 stands for the unit of pressure, %2 for the unit of length.
    using Aliases = QMap<QString, const char *>;

    const Aliases &aliasesOf( ResultLayer what )
    {
      static const Aliases spans = {
        { field::SPAN, QT_TRANSLATE_NOOP( "Stillhead", "Span" ) },
        { field::ROLE, QT_TRANSLATE_NOOP( "Stillhead", "Role" ) },
        { field::DRAWN_FID, QT_TRANSLATE_NOOP( "Stillhead", "Drawn feature" ) },
        { field::LENGTH, QT_TRANSLATE_NOOP( "Stillhead", "Length, %2" ) },
        { field::Z_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Lowest pipe elevation, %2" ) },
        { field::Z_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Highest pipe elevation, %2" ) },
        { field::P_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Lowest pressure at rest, low case, %1" ) },
        { field::P_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Highest pressure at rest, high case, %1" ) },
        { field::BAND, QT_TRANSLATE_NOOP( "Stillhead", "Band" ) },
        { field::BAND_TEXT, QT_TRANSLATE_NOOP( "Stillhead", "Pressure band" ) },
        { field::STATE, QT_TRANSLATE_NOOP( "Stillhead", "State" ) },
        { field::OVER, QT_TRANSLATE_NOOP( "Stillhead", "Over limit in the high case" ) },
        { field::SHORT, QT_TRANSLATE_NOOP( "Stillhead", "Short in the low case" ) },
        { field::PRESSURE_ZONE, QT_TRANSLATE_NOOP( "Stillhead", "Pressure zone" ) },
        { field::DOUBT, QT_TRANSLATE_NOOP( "Stillhead", "Doubt, ± %1" ) },
        { field::CLOSE_CALL, QT_TRANSLATE_NOOP( "Stillhead", "Too close to call" ) },
        { field::P_FAILED_OPEN, QT_TRANSLATE_NOOP( "Stillhead", "Highest pressure if a regulator fails open, %1" ) },
        { field::FAILED_OPEN_CAUSE, QT_TRANSLATE_NOOP( "Stillhead", "Regulator that causes it" ) },
      };
      static const Aliases nodes = {
        { field::NODE, QT_TRANSLATE_NOOP( "Stillhead", "Node" ) },
        { field::KIND, QT_TRANSLATE_NOOP( "Stillhead", "Kind" ) },
        { field::DEGREE, QT_TRANSLATE_NOOP( "Stillhead", "Pipes that meet" ) },
        { field::Z, QT_TRANSLATE_NOOP( "Stillhead", "Pipe elevation, %2" ) },
        { field::P_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Pressure at rest, low case, %1" ) },
        { field::P_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Pressure at rest, high case, %1" ) },
        { field::STATE, QT_TRANSLATE_NOOP( "Stillhead", "State" ) },
        { field::PRESSURE_ZONE, QT_TRANSLATE_NOOP( "Stillhead", "Pressure zone" ) },
        { field::NAME, QT_TRANSLATE_NOOP( "Stillhead", "Device" ) },
        { field::P_IN_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Inlet pressure, low case, %1" ) },
        { field::P_IN_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Inlet pressure, high case, %1" ) },
        { field::STATUS, QT_TRANSLATE_NOOP( "Stillhead", "Status of the regulator" ) },
      };
      static const Aliases stretches = {
        { field::STRETCH, QT_TRANSLATE_NOOP( "Stillhead", "Stretch" ) },
        { field::WHAT, QT_TRANSLATE_NOOP( "Stillhead", "Over or short" ) },
        { field::P_WORST, QT_TRANSLATE_NOOP( "Stillhead", "Worst pressure at rest, %1" ) },
        { field::BEYOND, QT_TRANSLATE_NOOP( "Stillhead", "Past the limit by, %1" ) },
        { field::Z_WORST, QT_TRANSLATE_NOOP( "Stillhead", "Pipe elevation there, %2" ) },
        { field::LENGTH, QT_TRANSLATE_NOOP( "Stillhead", "Length of pipe, %2" ) },
        { field::MAINLINES, QT_TRANSLATE_NOOP( "Stillhead", "Mainlines" ) },
        { field::LATERALS, QT_TRANSLATE_NOOP( "Stillhead", "Laterals" ) },
        { field::CLOSE_CALL, QT_TRANSLATE_NOOP( "Stillhead", "Too close to call" ) },
        { field::LABEL, QT_TRANSLATE_NOOP( "Stillhead", "Label" ) },
      };
      static const Aliases extremes = {
        { field::WHAT, QT_TRANSLATE_NOOP( "Stillhead", "What stands out" ) },
        { field::P, QT_TRANSLATE_NOOP( "Stillhead", "Pressure at rest, %1" ) },
        { field::Z, QT_TRANSLATE_NOOP( "Stillhead", "Pipe elevation, %2" ) },
        { field::PRESSURE_ZONE, QT_TRANSLATE_NOOP( "Stillhead", "Pressure zone" ) },
        { field::STRETCH, QT_TRANSLATE_NOOP( "Stillhead", "Stretch" ) },
        { field::DRAWN_LAYER, QT_TRANSLATE_NOOP( "Stillhead", "Drawn layer" ) },
        { field::DRAWN_FID, QT_TRANSLATE_NOOP( "Stillhead", "Drawn feature" ) },
        { field::DISTANCE_ALONG, QT_TRANSLATE_NOOP( "Stillhead", "Distance from the start of the drawn feature, %2" ) },
        { field::LABEL, QT_TRANSLATE_NOOP( "Stillhead", "Label" ) },
      };
      static const Aliases findings = {
        { field::FINDING, QT_TRANSLATE_NOOP( "Stillhead", "Finding" ) },
        { field::MESSAGE, QT_TRANSLATE_NOOP( "Stillhead", "Message" ) },
        { field::DRAWN_LAYER, QT_TRANSLATE_NOOP( "Stillhead", "Drawn layer" ) },
        { field::DRAWN_FID, QT_TRANSLATE_NOOP( "Stillhead", "Drawn feature" ) },
        { field::GAP, QT_TRANSLATE_NOOP( "Stillhead", "Gap, %2" ) },
      };
      static const Aliases bandAreas = {
        { field::BAND, QT_TRANSLATE_NOOP( "Stillhead", "Band" ) },
        { field::BAND_TEXT, QT_TRANSLATE_NOOP( "Stillhead", "Pressure band" ) },
        { field::P_FROM, QT_TRANSLATE_NOOP( "Stillhead", "Pressure from, %1" ) },
        { field::P_TO, QT_TRANSLATE_NOOP( "Stillhead", "Pressure to, %1" ) },
        { field::AREA, QT_TRANSLATE_NOOP( "Stillhead", "Area, square %2" ) },
      };
      static const Aliases regulators = {
        { field::NAME, QT_TRANSLATE_NOOP( "Stillhead", "Name" ) },
        { field::KIND, QT_TRANSLATE_NOOP( "Stillhead", "Kind" ) },
        { field::SET, QT_TRANSLATE_NOOP( "Stillhead", "Set, water running, %1" ) },
        { field::RISE, QT_TRANSLATE_NOOP( "Stillhead", "Lock-up rise, %1" ) },
        { field::DIRECTION, QT_TRANSLATE_NOOP( "Stillhead", "Direction along the drawn line" ) },
        { field::STATUS, QT_TRANSLATE_NOOP( "Stillhead", "Status" ) },
        { field::STAGE, QT_TRANSLATE_NOOP( "Stillhead", "Stage (1 nearest the source)" ) },
        { field::GROUND, QT_TRANSLATE_NOOP( "Stillhead", "Ground elevation, %2" ) },
        { field::Z, QT_TRANSLATE_NOOP( "Stillhead", "Pipe elevation, %2" ) },
        { field::INLET_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Inlet, low case, %1" ) },
        { field::INLET_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Inlet, high case, %1" ) },
        { field::DIFFERENTIAL, QT_TRANSLATE_NOOP( "Stillhead", "Low inlet less set, %1" ) },
        { field::RATIO, QT_TRANSLATE_NOOP( "Stillhead", "High inlet to set" ) },
        { field::SET_LEAST, QT_TRANSLATE_NOOP( "Stillhead", "Lowest set that serves the top, %1" ) },
        { field::SET_MOST, QT_TRANSLATE_NOOP( "Stillhead", "Highest set that protects the bottom, %1" ) },
        { field::LOCKUP, QT_TRANSLATE_NOOP( "Stillhead", "Gauge at no flow (lock-up), %1" ) },
        { field::PRESSURE_ZONE, QT_TRANSLATE_NOOP( "Stillhead", "Pressure zone it feeds" ) },
        { field::P_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Lowest in its zone, low case, %1" ) },
        { field::P_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Highest in its zone, high case, %1" ) },
        { field::Z_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Lowest pipe in its zone, %2" ) },
        { field::Z_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Highest pipe in its zone, %2" ) },
        { field::SERVES_UP_TO, QT_TRANSLATE_NOOP( "Stillhead", "Serves pipe up to, %2" ) },
        { field::HOLDS_DOWN_TO, QT_TRANSLATE_NOOP( "Stillhead", "Holds pipe down to, %2" ) },
        { field::P_FAILED_OPEN, QT_TRANSLATE_NOOP( "Stillhead", "Highest below it if it fails open, %1" ) },
        { field::LENGTH, QT_TRANSLATE_NOOP( "Stillhead", "Length of pipe in its zone, %2" ) },
        { field::DRAWN_LAYER, QT_TRANSLATE_NOOP( "Stillhead", "Drawn layer" ) },
        { field::DRAWN_FID, QT_TRANSLATE_NOOP( "Stillhead", "Drawn feature" ) },
        { field::DISTANCE_ALONG, QT_TRANSLATE_NOOP( "Stillhead", "Distance from the start of the drawn feature, %2" ) },
        { field::PLACE_FROM, QT_TRANSLATE_NOOP( "Stillhead", "May stand from, %2" ) },
        { field::PLACE_TO, QT_TRANSLATE_NOOP( "Stillhead", "May stand to, %2" ) },
        { field::WHY, QT_TRANSLATE_NOOP( "Stillhead", "Why" ) },
      };
      static const Aliases boosters = {
        { field::NAME, QT_TRANSLATE_NOOP( "Stillhead", "Name" ) },
        { field::KIND, QT_TRANSLATE_NOOP( "Stillhead", "Kind" ) },
        { field::BOOST, QT_TRANSLATE_NOOP( "Stillhead", "Adds at no flow, %1" ) },
        { field::BOOST_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Adds while water runs, %1" ) },
        { field::DIRECTION, QT_TRANSLATE_NOOP( "Stillhead", "Direction along the drawn line" ) },
        { field::Z, QT_TRANSLATE_NOOP( "Stillhead", "Pipe elevation, %2" ) },
        { field::INLET_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Inlet, low case, %1" ) },
        { field::INLET_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Inlet, high case, %1" ) },
        { field::OUTLET_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Outlet, low case, %1" ) },
        { field::OUTLET_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Outlet, high case, %1" ) },
        { field::LENGTH_SHORT, QT_TRANSLATE_NOOP( "Stillhead", "Length of short pipe that it serves, %2" ) },
        { field::Z_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Pipe beyond it that needs most, %2" ) },
        { field::Z_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Pipe beyond it that stands least, %2" ) },
        { field::SERVED_WITHOUT, QT_TRANSLATE_NOOP( "Stillhead", "Highest pipe served without it, %2" ) },
        { field::REGULATOR_FOLLOWS, QT_TRANSLATE_NOOP( "Stillhead", "A regulator must follow" ) },
        { field::DRAWN_LAYER, QT_TRANSLATE_NOOP( "Stillhead", "Drawn layer" ) },
        { field::DRAWN_FID, QT_TRANSLATE_NOOP( "Stillhead", "Drawn feature" ) },
        { field::DISTANCE_ALONG, QT_TRANSLATE_NOOP( "Stillhead", "Distance from the start of the drawn feature, %2" ) },
        { field::WHY, QT_TRANSLATE_NOOP( "Stillhead", "Why" ) },
      };
      static const Aliases comparison = {
        { field::RANK, QT_TRANSLATE_NOOP( "Stillhead", "Rank" ) },
        { field::NAME, QT_TRANSLATE_NOOP( "Stillhead", "Option" ) },
        { field::SOURCE, QT_TRANSLATE_NOOP( "Stillhead", "What it gives" ) },
        { field::LEVEL_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Static level, high case, elevation %2" ) },
        { field::LEVEL_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Static level, low case, elevation %2" ) },
        { field::LENGTH_WITHIN, QT_TRANSLATE_NOOP( "Stillhead", "Within limits, %2 of pipe" ) },
        { field::LENGTH_OVER, QT_TRANSLATE_NOOP( "Stillhead", "Over, %2 of pipe" ) },
        { field::LENGTH_SHORT, QT_TRANSLATE_NOOP( "Stillhead", "Short, %2 of pipe" ) },
        { field::P_LOW, QT_TRANSLATE_NOOP( "Stillhead", "Lowest pressure, low case, %1" ) },
        { field::P_HIGH, QT_TRANSLATE_NOOP( "Stillhead", "Highest pressure, high case, %1" ) },
        { field::REGULATORS, QT_TRANSLATE_NOOP( "Stillhead", "Regulators needed" ) },
        { field::PROVEN, QT_TRANSLATE_NOOP( "Stillhead", "That number is proven to be the least" ) },
        { field::LENGTH_NOT_MENDED, QT_TRANSLATE_NOOP( "Stillhead", "Over and beyond mending, %2 of pipe" ) },
        { field::BOOSTERS, QT_TRANSLATE_NOOP( "Stillhead", "Boosters needed" ) },
        { field::BOOST, QT_TRANSLATE_NOOP( "Stillhead", "Largest boost while water runs, %1" ) },
        { field::NOTE, QT_TRANSLATE_NOOP( "Stillhead", "Note" ) },
      };
      static const Aliases groundLimits = {
        { field::WHAT, QT_TRANSLATE_NOOP( "Stillhead", "Ceiling or floor" ) },
        { field::ELEVATION, QT_TRANSLATE_NOOP( "Stillhead", "Ground elevation, %2" ) },
        { field::P, QT_TRANSLATE_NOOP( "Stillhead", "Pressure limit, %1" ) },
        { field::LABEL, QT_TRANSLATE_NOOP( "Stillhead", "Label" ) },
      };
      static const Aliases none;
      switch ( what )
      {
      case ResultLayer::Spans:
        return spans;
      case ResultLayer::Nodes:
        return nodes;
      case ResultLayer::Stretches:
        return stretches;
      case ResultLayer::Extremes:
        return extremes;
      case ResultLayer::Findings:
        return findings;
      case ResultLayer::BandAreas:
        return bandAreas;
      case ResultLayer::Regulators:
        return regulators;
      case ResultLayer::Boosters:
        return boosters;
      case ResultLayer::Comparison:
        return comparison;
      case ResultLayer::GroundLimits:
        return groundLimits;
      case ResultLayer::Surface:
        break;
      }
      return none;
    }

  } // namespace

  void setFieldAliases( QgsVectorLayer &layer, ResultLayer what, const ResultStyle &style )
  {
    const Aliases &aliases = aliasesOf( what );
    for ( auto alias = aliases.constBegin(); alias != aliases.constEnd(); ++alias )
    {
      const int index = layer.fields().lookupField( alias.key() );
      if ( index < 0 )
        continue;
      QString text = Text::tr( alias.value() );
      text.replace( QLatin1String( "%1" ), style.pressureUnit ).replace( QLatin1String( "%2" ), style.lengthUnit );
      layer.setFieldAlias( index, text );
    }
  }

} // namespace stillhead
