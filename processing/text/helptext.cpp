// SPDX-License-Identifier: GPL-2.0-or-later
// Paragraphs, each translated as a whole; the cautions close every text.
#include "processing/text/helptext.h"

#include "processing/text/cautions.h"
#include "processing/text/text.h"

#include <QStringList>

namespace stillhead
{

  namespace
  {

    QString withCautions( QStringList paragraphs )
    {
      paragraphs << runningWaterCaution() << safetyCaution();
      return paragraphs.join( QStringLiteral( "\n\n" ) );
    }

    QString unitsParagraph()
    {
      return Text::tr(
        "Units: every pressure is in the chosen pressure unit and every elevation, length, depth and height in "
        "the chosen length unit, whatever the map units are. Only the Z of result geometries is in the "
        "terrain's own unit, so that they drape." );
    }

  } // namespace

  QString staticPressureHelp()
  {
    return withCautions( {
      Text::tr(
        "Finds the pressure that water at rest puts on every metre of drawn pipe, where that is too much or too "
        "little, and which pipe water at rest does not reach." ),
      Text::tr(
        "Inputs: mainlines and laterals drawn as lines, a bare-earth terrain raster, and one source or "
        "several (a gauge reading or a water level each, with its highest value: night, winter, tank full; and its "
        "lowest: summer peak, tank low), and devices in the pipe: regulators, boosters, check, closed and control "
        "valves. "
        "Between two drawn vertices the pipe follows the ground at its depth of cover; lowest and highest places are "
        "solved, not sampled. Lines join where ends meet, or where an end meets a line, within the join tolerance." ),
      Text::tr(
        "Outputs: SPANS, the pipe cut exactly where a pressure limit, the static level or the edge of the terrain is "
        "met, with pressures, band and state; NODES, where pipes end or meet; STRETCHES, connected pipe that is over "
        "or short; EXTREMES, the worst place of each stretch and zone, then the summits and sags of the mainlines, "
        "places for air valves, drains and blow-out points; FINDINGS, what to look at in the drawing; SCHEDULE, the "
        "devices with what they hold and serve; SURFACE, the same static level as a raster (off by default); SUMMARY, "
        "the "
        "figures in plain sentences; and "
        "numbers for use in models." ),
      Text::tr(
        "A summit is a place from which no way along mainlines leads to higher pipe without falling by the depth of "
        "summits and sags first, and from which the pipe falls by that depth on two sides at least; a sag is the same "
        "upside down. Mainlines count as joined pipe, wherever drawn features begin and end, and every mainline leg at "
        "a "
        "joint counts; laterals do not. A dead end is neither, and pipe without terrain ends the way. Of a level top "
        "one "
        "place stands. The pressure of a summit is that of the low case, the pressure of a sag that of the high "
        "case." ),
      unitsParagraph(),
      Text::tr(
        "Limits: a regulator holds its lock-up (set plus rise) in the high case and its setting in the low case, as if "
        "in good order; FAILED_OPEN asks what it would be otherwise. The terrain is taken as given (say how far it may "
        "be off "
        "and places too close to call are marked); where it has no data there are no figures. Features keep their own "
        "fields; a drawn key `fid` is not copied, `drawn_fid` names the drawn feature." ),
    } );
  }

  QString pressureSurfaceHelp()
  {
    return withCautions( {
      Text::tr(
        "Finds the pressure that water at rest would put on a pipe anywhere on the terrain if it were joined to the "
        "source without any device between." ),
      Text::tr(
        "Inputs: a bare-earth terrain raster and one source: a gauge reading or a water level, with its highest value "
        "and, if known, its lowest; a depth of cover; optionally an area to stay within." ),
      Text::tr(
        "Outputs: SURFACE, a raster on the terrain's own grid (band 1: high case; band 2: low case, only where a low "
        "value is given); BAND_AREAS, polygons of the pressure bands of the high case; GROUND_LIMITS, lines "
        "on the ground of the ceiling and the floor, higher ground on their left; STATIC_LEVEL_HIGH and "
        "STATIC_LEVEL_LOW; GROUND_TOO_HIGH, the ceiling: the ground elevation above which the lowest acceptable "
        "pressure is not "
        "met (low case); GROUND_TOO_LOW, the floor: the one below which the highest is passed (high case)." ),
      unitsParagraph(),
      Text::tr(
        "Limits: no pipe is looked at, so neither summits on the way nor the way itself; negative values lie above the "
        "static level." ),
    } );
  }

  QString proposeRegulatorsHelp()
  {
    return withCautions( {
      Text::tr(
        "Finds the fewest regulators that bring every drawn pipe within its highest acceptable pressure at rest (at no "
        "flow: set plus lock-up rise) while nothing that the source serves today drops below the lowest acceptable "
        "pressure at the setting, and proposes places and settings." ),
      Text::tr(
        "Inputs: as for static pressure along pipes. Devices given stay as they are and are not counted. Pipe that the "
        "source does not serve today is left out of the test. Where water behind a place over limit needs more level "
        "than "
        "that place stands, no regulator can mend it; it is reported and the rest is solved." ),
      Text::tr(
        "Outputs: REGULATORS, points that can be given back as DEVICES unchanged, each with its setting, lock-up, what "
        "it "
        "serves and holds, between which places the same setting works, and why it stands there; SPANS, STRETCHES, "
        "EXTREMES and FINDINGS of the drawing with the regulators in place; SUMMARY; and numbers: REGULATOR_COUNT, "
        "REGULATOR_BOUND (no plan can have fewer), PROVEN (1 where both agree and all rules are kept)." ),
      unitsParagraph(),
      Text::tr(
        "Limits: only the number is claimed to be the least, not cost; in looped pipe fed from several sides every "
        "inlet "
        "takes its own regulator, and a number that is not proven is said to be so. Flow is not looked at: size each "
        "regulator for its largest and its smallest flow." ),
    } );
  }

  QString proposeBoostHelp()
  {
    return withCautions( {
      Text::tr(
        "For drawn pipe that is short of pressure: the least pressure to add while water runs, and the place nearest "
        "the source at which a booster brings all pipe beyond it to the lowest acceptable pressure without lifting any "
        "of it above the highest at no flow." ),
      Text::tr(
        "Inputs: as for static pressure along pipes, and how far a booster's pressure at no flow stands above the one "
        "it adds while water runs. Devices given stay as they are. Where no place keeps all pipe beyond it within "
        "limits, the booster stands just before the pipe that is short and `regulator_follows` says that a regulator "
        "must follow it (Propose regulators, with the boosters as devices, finds where)." ),
      Text::tr(
        "Outputs: BOOSTERS, points that can be given back as DEVICES unchanged, each with what it adds at no flow "
        "(`boost`) and while water runs (`boost_low`), its inlet and outlet, the length of short pipe it serves, the "
        "highest pipe that is served without it, and why it stands there; SPANS, STRETCHES, EXTREMES and FINDINGS of "
        "the drawing with the boosters in place; SUMMARY; and numbers." ),
      unitsParagraph(),
      Text::tr(
        "Limits: a booster stands on a leg that alone feeds what is beyond it; where short pipe is looped from the "
        "source on, a pump at the source is named instead. Flow is not looked at: size a booster for its flow, guard "
        "it against running dry, and ask the water supplier before drawing on the main." ),
    } );
  }

  QString compareSourcesHelp()
  {
    return withCautions( {
      Text::tr(
        "Sets options for the connection side by side: for each the lengths of pipe within limits, over and short at "
        "rest, the fewest regulators it would need, and the boost it would need, sorted by what you choose." ),
      Text::tr( "Inputs: mainlines and laterals, a bare-earth terrain raster, and a layer of points, each of which is "
                "looked at "
                "as the only source; limits and rules as in the other algorithms." ),
      Text::tr(
        "Outputs: COMPARISON, the options as points, the best first (`rank`), with their figures, or with the reason "
        "why an option has none (`note`); SPANS and the other layers for the best option as it is, unregulated; "
        "SUMMARY; and the numbers OPTION_COUNT and BEST (the number of the best option in the order of the layer)." ),
      unitsParagraph(),
      Text::tr(
        "Limits: options are compared by pressure at rest alone; what a connection can deliver, and what it costs, is "
        "not looked at. The numbers of regulators and boosters are each counted on the drawing as it is, not one on "
        "top "
        "of the other." ),
    } );
  }

} // namespace stillhead
