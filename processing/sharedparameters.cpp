// SPDX-License-Identifier: GPL-2.0-or-later
// Declares the shared parameters, each with its label, its default and a help text that names unit and default.
// Whatever is not required by the platform's own meaning is flagged optional or has a default, since a runner without
// a screen takes a missing band or blank text for an error.
#include "processing/sharedparameters.h"

#include "processing/parameternames.h"
#include "processing/qgiscompat.h"
#include "processing/text/text.h"

namespace stillhead
{

  namespace
  {

    constexpr double DEFAULT_WATER_CELSIUS = 15.0;

    void add( ParameterList &list, QgsProcessingParameterDefinition *parameter, const QString &help )
    {
      parameter->setHelp( help );
      list.emplace_back( parameter );
    }

    void addAdvanced( ParameterList &list, QgsProcessingParameterDefinition *parameter, const QString &help )
    {
      parameter->setFlags( parameter->flags() | compat::Parameter::Advanced );
      add( list, parameter, help );
    }

    QgsProcessingParameterNumber *optionalNumber( const QString &name, const QString &label )
    {
      return new QgsProcessingParameterNumber( name, label, compat::NumberType::Double, QVariant(), true );
    }

    QgsProcessingParameterNumber *number( const QString &name, const QString &label, double byDefault )
    {
      return new QgsProcessingParameterNumber( name, label, compat::NumberType::Double, byDefault );
    }

    QgsProcessingParameterEnum *choice( const QString &name, const QString &label, const QStringList &options )
    {
      return new QgsProcessingParameterEnum( name, label, options, false, 0 );
    }

    QString coverLabel()
    {
      return Text::tr( "Depth of cover (ground surface down to the top of the pipe)" );
    }

  } // namespace

  ParameterList drawingParameters()
  {
    ParameterList list;
    add( list,
      new QgsProcessingParameterFeatureSource(
        parameter::MAINS, Text::tr( "Mainlines" ), compat::sourceTypes( { compat::Source::Line } ) ),
      Text::tr( "Pipe that is always under pressure, drawn as lines. The results are in the CRS of this layer. Fields "
                "named `system` and `cover`, where there are any, are read from it." ) );
    add( list,
      new QgsProcessingParameterFeatureSource( parameter::LATERALS, Text::tr( "Laterals" ),
        compat::sourceTypes( { compat::Source::Line } ), QVariant(), true ),
      Text::tr( "Pipe below control valves, drawn as lines, in any CRS. Its figure is what it would hold with that "
                "valve open and nothing running: the most its heads can see. Optional." ) );
    return list;
  }

  ParameterList terrainParameters()
  {
    ParameterList list;
    add( list, new QgsProcessingParameterRasterLayer( parameter::TERRAIN, Text::tr( "Terrain (bare earth)" ) ),
      Text::tr( "Raster of ground elevations without trees and roofs, in any CRS. Elevation is taken from the bilinear "
                "surface through the pixel centres; where a pixel that carries weight has no data there is no "
                "elevation." ) );
    add( list,
      new QgsProcessingParameterBand(
        parameter::TERRAIN_BAND, Text::tr( "Band of the terrain" ), 1, parameter::TERRAIN, true ),
      Text::tr( "Band that holds the elevations. Default: 1." ) );
    add( list,
      choice( parameter::TERRAIN_UNIT, Text::tr( "Unit of the terrain's elevations" ),
        { Text::tr( "As the raster says" ), Text::tr( "Metre" ), Text::tr( "Foot (international)" ),
          Text::tr( "US survey foot" ) } ),
      Text::tr( "Default: as the unit of the band or the vertical part of the raster's CRS says; if neither says, "
                "metres are assumed and the log says so. Choose a unit here where the raster is wrong or silent." ) );
    return list;
  }

  ParameterList sourceParameters( bool network )
  {
    ParameterList list;
    add( list, new QgsProcessingParameterPoint( parameter::SOURCE, Text::tr( "Source" ), QVariant(), true ),
      network ? Text::tr( "Where the pressure comes from: meter, tank or pump. Joins the nearest pipe within the "
                          "source's reach. Needed." )
              : Text::tr( "Where the pressure comes from: meter, tank or pump. Needed." ) );
    if ( network )
      add( list, optionalNumber( parameter::SOURCE_REACH, Text::tr( "How far the source may lie from the pipe" ) ),
        Text::tr( "Ground distance in the length unit. Unset: 10 m. A source farther away than that stops the run." ) );
    add( list,
      choice( parameter::SOURCE_KIND, Text::tr( "What is known at the source" ),
        { Text::tr( "Pressure read on a gauge" ), Text::tr( "Water level as elevation" ),
          Text::tr( "Water level above ground" ) } ),
      Text::tr( "What the source's value is: a pressure read at rest on a gauge, or the open water level of a tank or "
                "pond, as an elevation or above ground. Default: a pressure." ) );
    add( list, optionalNumber( parameter::SOURCE_VALUE, Text::tr( "Source value, high case" ) ),
      Text::tr( "The highest that the source gives at rest: night, winter, tank full. In the pressure unit for a gauge "
                "reading, in the length unit for a water level. Needed." ) );
    add( list, optionalNumber( parameter::SOURCE_LOW, Text::tr( "Source value, low case" ) ),
      Text::tr( "The lowest that the source gives at rest: summer peak, tank low. Same unit as the high case and not "
                "above it. Unset: as the high case." ) );
    add( list, optionalNumber( parameter::SOURCE_ELEVATION, Text::tr( "Surveyed ground elevation at the source" ) ),
      Text::tr( "In the length unit. Unset: the terrain at the source." ) );
    add( list, number( parameter::GAUGE_HEIGHT, Text::tr( "Height of the gauge above ground" ), 0.0 ),
      Text::tr( "In the length unit; negative below ground. Only for a pressure read on a gauge. Default: 0." ) );
    add( list, optionalNumber( parameter::BOOST, Text::tr( "Pump at the source: pressure added at no flow" ) ),
      Text::tr( "In the pressure unit; counts in the high case. Unset: no pump." ) );
    add( list, optionalNumber( parameter::BOOST_LOW, Text::tr( "Pump at the source: pressure added while running" ) ),
      Text::tr( "In the pressure unit; counts in the low case. Unset: as at no flow." ) );
    add( list,
      new QgsProcessingParameterString(
        parameter::SOURCE_NOTE, Text::tr( "Note on the reading" ), QVariant(), false, true ),
      Text::tr( "Who read it, when and where. Kept with the results. Optional." ) );
    return list;
  }

  ParameterList feedLayerParameters()
  {
    ParameterList list;
    add( list,
      new QgsProcessingParameterFeatureSource( parameter::SOURCES, Text::tr( "Sources (several)" ),
        compat::sourceTypes( { compat::Source::Point } ), QVariant(), true ),
      Text::tr(
        "Points, in place of SOURCE, where there are several sources: fields `kind` (pressure reading, water level, "
        "level above ground) and `value`, and as needed `name`, `system`, `low`, `elevation`, `gauge_height`, "
        "`boost`, `boost_low`, `note`, in the chosen units. Optional." ) );
    add( list,
      new QgsProcessingParameterFeatureSource(
        parameter::DEVICES, Text::tr( "Devices" ), compat::sourceTypes( { compat::Source::Point } ), QVariant(), true ),
      Text::tr(
        "Points on the pipe: field `kind` (regulator, booster, check valve, closed valve, control valve), and as "
        "needed "
        "`name`, `system`, `set` (regulator: outlet pressure while water runs), `rise` (lock-up rise), `boost`, "
        "`boost_low`, `elevation`, `direction` (from the source, start to end, end to start), in the chosen units. "
        "Optional." ) );
    return list;
  }

  ParameterList lockupParameter()
  {
    ParameterList list;
    addAdvanced( list, optionalNumber( parameter::LOCKUP_RISE, Text::tr( "Lock-up rise of regulators" ) ),
      Text::tr(
        "How far a regulator's outlet rises above its setting at no flow, where it has no `rise` of its own: see its "
        "maker's sheet. In the pressure unit. Unset: 10 psi, 70 kPa, 0.7 bar, 7 m or 25 ft of water." ) );
    return list;
  }

  ParameterList proposalParameters()
  {
    ParameterList list;
    add( list, optionalNumber( parameter::LEAST_DROP, Text::tr( "Least drop over a regulator" ) ),
      Text::tr(
        "How far the low-case pressure at a regulator's inlet must stand above its setting, so that it holds: see its "
        "maker's sheet. In the pressure unit. Unset: 10 psi, 70 kPa, 0.7 bar, 7 m or 25 ft of water." ) );
    add( list, number( parameter::MOST_RATIO, Text::tr( "Largest ratio of inlet to setting" ), 3.0 ),
      Text::tr( "Of gauge pressures, high case: a larger reduction wears a valve out and is split between two. "
                "0: no limit. Default: 3 (common practice, no source)." ) );
    add( list, number( parameter::SETTING_STEP, Text::tr( "Settings are multiples of" ), 0.0 ),
      Text::tr( "In the pressure unit; 5 gives settings such as 35 and 40. Default: 0, any setting." ) );
    return list;
  }

  ParameterList boostRiseParameter()
  {
    ParameterList list;
    add( list, optionalNumber( parameter::BOOST_RISE, Text::tr( "Booster's rise at no flow" ) ),
      Text::tr( "How far a booster's pressure at no flow stands above the pressure it adds while water runs: see its "
                "maker's curve. In the pressure unit. Unset: 10 psi, 70 kPa, 0.7 bar, 7 m or 25 ft of water." ) );
    return list;
  }

  ParameterList optionParameters()
  {
    ParameterList list;
    add( list,
      new QgsProcessingParameterFeatureSource( parameter::OPTIONS, Text::tr( "Options for the connection" ),
        compat::sourceTypes( { compat::Source::Point } ) ),
      Text::tr(
        "Points, one for each option; each is looked at as the only source. Fields `kind` (pressure reading, water "
        "level, level above ground) and `value`, and as needed `name`, `system`, `low`, `elevation`, `gauge_height`, "
        "`boost`, `boost_low`, `note`, in the chosen units." ) );
    add( list, optionalNumber( parameter::SOURCE_REACH, Text::tr( "Options join pipe within" ) ),
      Text::tr( "Ground distance from an option's point to the pipe it joins, in the length unit. Unset: 10 m." ) );
    add( list,
      choice( parameter::SORT_BY, Text::tr( "Sort by" ),
        { Text::tr( "Longest within limits" ), Text::tr( "Least over" ), Text::tr( "Least short" ),
          Text::tr( "Fewest regulators" ), Text::tr( "Least boost" ) } ),
      Text::tr( "What makes an option the better one. Default: the longest length of pipe within limits." ) );
    add( list,
      new QgsProcessingParameterFeatureSource(
        parameter::DEVICES, Text::tr( "Devices" ), compat::sourceTypes( { compat::Source::Point } ), QVariant(), true ),
      Text::tr( "Points on the pipe that stand whatever the option, as for static pressure along pipes. Optional." ) );
    return list;
  }

  ParameterList failedOpenParameter()
  {
    ParameterList list;
    addAdvanced( list,
      choice( parameter::FAILED_OPEN, Text::tr( "What if regulators fail open" ),
        { Text::tr( "Not asked" ), Text::tr( "Each one in turn" ), Text::tr( "All at once" ) } ),
      Text::tr(
        "Gives every span the highest pressure it would see if a regulator passed all pressure (`p_failed_open`), and "
        "the regulator that causes it. Default: not asked." ) );
    return list;
  }

  ParameterList coverParameter()
  {
    ParameterList list;
    add( list, number( parameter::COVER, coverLabel(), 0.0 ),
      Text::tr( "In the length unit; pressure is taken at this depth. Default: 0, at the ground surface." ) );
    return list;
  }

  ParameterList pipeParameters()
  {
    ParameterList list;
    QgsProcessingParameterNumber *cover = number( parameter::COVER, coverLabel(), 0.0 );
    cover->setIsDynamic( true );
    cover->setDynamicPropertyDefinition(
      QgsPropertyDefinition( parameter::COVER, Text::tr( "Depth of cover" ), QgsPropertyDefinition::Double ) );
    cover->setDynamicLayerParameterName( parameter::MAINS );
    add( list, cover,
      Text::tr( "In the length unit; pressure is taken at this depth. A drawn feature's own `cover` field goes before "
                "it where it is set. Default: 0, at the ground surface." ) );
    add( list,
      new QgsProcessingParameterBoolean(
        parameter::USE_LINE_Z, Text::tr( "Lines carry surveyed pipe elevations" ), false ),
      Text::tr( "Take the drawn Z as the elevation of the pipe, in place of terrain and cover, straight between "
                "vertices. A line without usable Z falls back to the terrain, with a finding. Default: no." ) );
    add( list,
      choice( parameter::LINE_Z_UNIT, Text::tr( "Unit of the drawn Z" ),
        { Text::tr( "As the terrain" ), Text::tr( "Metre" ), Text::tr( "Foot (international)" ),
          Text::tr( "US survey foot" ) } ),
      Text::tr( "Only where lines carry surveyed elevations. Default: as the terrain." ) );
    add( list, optionalNumber( parameter::JOIN_TOLERANCE, Text::tr( "Join tolerance" ) ),
      Text::tr( "Ground distance in the length unit within which an end joins another end or a line. Unset: 0.1 m." ) );
    add( list,
      new QgsProcessingParameterBoolean( parameter::JOIN_CROSSINGS, Text::tr( "Join lines that merely cross" ), false ),
      Text::tr( "Treat every crossing of two lines as a joint. Default: no; each crossing without a joint is a "
                "finding." ) );
    return list;
  }

  ParameterList limitParameters()
  {
    ParameterList list;
    add( list, optionalNumber( parameter::LEAST, Text::tr( "Lowest acceptable static pressure" ) ),
      Text::tr( "What the heads need plus what running water takes on the way. In the pressure unit. Unset: 30 psi, "
                "200 kPa, 2 bar, 20 m or 70 ft of water." ) );
    add( list, optionalNumber( parameter::MOST, Text::tr( "Highest acceptable static pressure" ) ),
      Text::tr( "What pipe, fittings and heads may stand at rest. In the pressure unit. Unset: 80 psi, 550 kPa, "
                "5.5 bar, 55 m or 185 ft of water." ) );
    add( list,
      new QgsProcessingParameterString(
        parameter::BANDS, Text::tr( "Limits between pressure bands" ), QVariant(), false, true ),
      Text::tr( "Rising limits in the pressure unit, separated by comma, semicolon or space; a point is the decimal "
                "mark. Unset: 30, 45, 60, 80, 100 psi; 200, 300, 400, 550, 700 kPa; 2, 3, 4, 5.5, 7 bar; 20, 30, 40, "
                "55, 70 m or 70, 105, 140, 185, 230 ft of water. Unset with a limit given above: the lowest "
                "acceptable pressure, two thirds between, the highest, and 1.25 times the highest." ) );
    return list;
  }

  ParameterList judgementParameters()
  {
    ParameterList list;
    addAdvanced( list,
      optionalNumber( parameter::LATERAL_LEAST, Text::tr( "Lowest acceptable static pressure of laterals" ) ),
      Text::tr( "In the pressure unit. Unset: as for all pipe." ) );
    addAdvanced( list,
      optionalNumber( parameter::LATERAL_MOST, Text::tr( "Highest acceptable static pressure of laterals" ) ),
      Text::tr( "In the pressure unit. Unset: as for all pipe." ) );
    addAdvanced( list, number( parameter::TERRAIN_RMSE, Text::tr( "Error of the terrain (root mean square)" ), 0.0 ),
      Text::tr( "Vertical error of the terrain in the length unit. Default: 0." ) );
    addAdvanced( list, number( parameter::READING_ERROR, Text::tr( "Error of the reading (±, at 95 %)" ), 0.0 ),
      Text::tr( "Of the gauge or water level, in the pressure unit. Default: 0." ) );
    return list;
  }

  ParameterList sagParameter()
  {
    ParameterList list;
    add( list, optionalNumber( parameter::SAG_DEPTH, Text::tr( "Depth of summits and sags" ) ),
      Text::tr(
        "Fall or rise of a mainline in the length unit that makes a high or low place worth an air valve, a "
        "drain or a blow-out point: it must fall (rise) by that much on two sides before it goes higher (lower) "
        "or ends. Unset: 2 ft or 0.5 m; 0: a millimetre." ) );
    return list;
  }

  ParameterList areaParameter()
  {
    ParameterList list;
    add( list,
      new QgsProcessingParameterFeatureSource( parameter::AREA, Text::tr( "Area to stay within" ),
        compat::sourceTypes( { compat::Source::Polygon } ), QVariant(), true ),
      Text::tr( "Polygons in any CRS; cells whose centre lies outside get no pressure. Optional: unset, the whole "
                "terrain." ) );
    return list;
  }

  ParameterList unitParameters()
  {
    ParameterList list;
    add( list,
      choice( parameter::PRESSURE_UNIT, Text::tr( "Pressure unit" ),
        { QStringLiteral( "psi" ), QStringLiteral( "kPa" ), QStringLiteral( "bar" ), Text::tr( "metres of water" ),
          Text::tr( "feet of water" ) } ),
      Text::tr( "Unit of every pressure given and returned. Default: psi." ) );
    add( list,
      choice( parameter::LENGTH_UNIT, Text::tr( "Length unit" ), { Text::tr( "feet" ), Text::tr( "metres" ) } ),
      Text::tr( "Unit of every elevation, length, depth and height given and returned (international feet). Only the Z "
                "of result geometries is in the terrain's unit. Default: feet." ) );
    addAdvanced( list,
      number( parameter::WATER_TEMPERATURE, Text::tr( "Water temperature (°C)" ), DEFAULT_WATER_CELSIUS ),
      Text::tr( "0 to 40 °C; decides the weight of water (0.43314 psi per foot at 15 °C). Default: 15." ) );
    return list;
  }

} // namespace stillhead
