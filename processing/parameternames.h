// SPDX-License-Identifier: GPL-2.0-or-later
// Every name that users' models and scripts hold on to: algorithm ids, parameters, outputs, fields and the words that
// stand in them. Once released none of them ever changes; tests/processing/contract.txt lists them all.
#pragma once

#include <QString>

//! Ids of algorithms, without the provider's.
namespace stillhead::algorithm
{
  inline const QString STATIC_PRESSURE = QStringLiteral( "staticpressure" );
  inline const QString PRESSURE_SURFACE = QStringLiteral( "pressuresurface" );
  inline const QString NEW_PLAN = QStringLiteral( "newplan" );
} // namespace stillhead::algorithm

namespace stillhead::parameter
{
  inline const QString MAINS = QStringLiteral( "MAINS" );
  inline const QString LATERALS = QStringLiteral( "LATERALS" );
  inline const QString TERRAIN = QStringLiteral( "TERRAIN" );
  inline const QString TERRAIN_BAND = QStringLiteral( "TERRAIN_BAND" );
  inline const QString TERRAIN_UNIT = QStringLiteral( "TERRAIN_UNIT" );
  inline const QString SOURCE = QStringLiteral( "SOURCE" );
  inline const QString SOURCE_REACH = QStringLiteral( "SOURCE_REACH" );
  inline const QString SOURCE_KIND = QStringLiteral( "SOURCE_KIND" );
  inline const QString SOURCE_VALUE = QStringLiteral( "SOURCE_VALUE" );
  inline const QString SOURCE_LOW = QStringLiteral( "SOURCE_LOW" );
  inline const QString SOURCE_ELEVATION = QStringLiteral( "SOURCE_ELEVATION" );
  inline const QString GAUGE_HEIGHT = QStringLiteral( "GAUGE_HEIGHT" );
  inline const QString BOOST = QStringLiteral( "BOOST" );
  inline const QString BOOST_LOW = QStringLiteral( "BOOST_LOW" );
  inline const QString SOURCE_NOTE = QStringLiteral( "SOURCE_NOTE" );
  inline const QString COVER = QStringLiteral( "COVER" );
  inline const QString USE_LINE_Z = QStringLiteral( "USE_LINE_Z" );
  inline const QString LINE_Z_UNIT = QStringLiteral( "LINE_Z_UNIT" );
  inline const QString JOIN_TOLERANCE = QStringLiteral( "JOIN_TOLERANCE" );
  inline const QString JOIN_CROSSINGS = QStringLiteral( "JOIN_CROSSINGS" );
  inline const QString LEAST = QStringLiteral( "LEAST" );
  inline const QString MOST = QStringLiteral( "MOST" );
  inline const QString SAG_DEPTH = QStringLiteral( "SAG_DEPTH" );
  inline const QString LATERAL_LEAST = QStringLiteral( "LATERAL_LEAST" );
  inline const QString LATERAL_MOST = QStringLiteral( "LATERAL_MOST" );
  inline const QString BANDS = QStringLiteral( "BANDS" );
  inline const QString TERRAIN_RMSE = QStringLiteral( "TERRAIN_RMSE" );
  inline const QString READING_ERROR = QStringLiteral( "READING_ERROR" );
  inline const QString PRESSURE_UNIT = QStringLiteral( "PRESSURE_UNIT" );
  inline const QString LENGTH_UNIT = QStringLiteral( "LENGTH_UNIT" );
  inline const QString WATER_TEMPERATURE = QStringLiteral( "WATER_TEMPERATURE" );
  inline const QString AREA = QStringLiteral( "AREA" );
  inline const QString PLAN = QStringLiteral( "PLAN" );
  inline const QString CRS = QStringLiteral( "CRS" );
  inline const QString ADD_TO_PROJECT = QStringLiteral( "ADD_TO_PROJECT" );
} // namespace stillhead::parameter

//! Sinks, rasters, numbers and texts that the algorithms give.
namespace stillhead::output
{
  inline const QString SPANS = QStringLiteral( "SPANS" );
  inline const QString NODES = QStringLiteral( "NODES" );
  inline const QString STRETCHES = QStringLiteral( "STRETCHES" );
  inline const QString EXTREMES = QStringLiteral( "EXTREMES" );
  inline const QString FINDINGS = QStringLiteral( "FINDINGS" );
  inline const QString SURFACE = QStringLiteral( "SURFACE" );
  inline const QString BAND_AREAS = QStringLiteral( "BAND_AREAS" );
  inline const QString GROUND_LIMITS = QStringLiteral( "GROUND_LIMITS" );
  inline const QString SUMMARY = QStringLiteral( "SUMMARY" );
  inline const QString SPAN_COUNT = QStringLiteral( "SPAN_COUNT" );
  inline const QString NODE_COUNT = QStringLiteral( "NODE_COUNT" );
  inline const QString STRETCH_COUNT = QStringLiteral( "STRETCH_COUNT" );
  inline const QString FINDING_COUNT = QStringLiteral( "FINDING_COUNT" );
  inline const QString STATIC_LEVEL_HIGH = QStringLiteral( "STATIC_LEVEL_HIGH" );
  inline const QString STATIC_LEVEL_LOW = QStringLiteral( "STATIC_LEVEL_LOW" );
  inline const QString P_LOWEST = QStringLiteral( "P_LOWEST" );
  inline const QString P_HIGHEST = QStringLiteral( "P_HIGHEST" );
  inline const QString LENGTH_TOTAL = QStringLiteral( "LENGTH_TOTAL" );
  inline const QString LENGTH_WITHIN = QStringLiteral( "LENGTH_WITHIN" );
  inline const QString LENGTH_OVER = QStringLiteral( "LENGTH_OVER" );
  inline const QString LENGTH_SHORT = QStringLiteral( "LENGTH_SHORT" );
  inline const QString LENGTH_NO_SOURCE = QStringLiteral( "LENGTH_NO_SOURCE" );
  inline const QString LENGTH_NO_TERRAIN = QStringLiteral( "LENGTH_NO_TERRAIN" );
  inline const QString LENGTH_CLOSE_CALL = QStringLiteral( "LENGTH_CLOSE_CALL" );
  inline const QString GROUND_TOO_HIGH = QStringLiteral( "GROUND_TOO_HIGH" );
  inline const QString GROUND_TOO_LOW = QStringLiteral( "GROUND_TOO_LOW" );
} // namespace stillhead::output

//! Fields of the result layers, and of drawn layers where they say something to us.
namespace stillhead::field
{
  inline const QString SPAN = QStringLiteral( "span" );
  inline const QString ROLE = QStringLiteral( "role" );
  inline const QString DRAWN_FID = QStringLiteral( "drawn_fid" );
  inline const QString DRAWN_LAYER = QStringLiteral( "drawn_layer" );
  inline const QString LENGTH = QStringLiteral( "length" );
  inline const QString Z_LOW = QStringLiteral( "z_low" );
  inline const QString Z_HIGH = QStringLiteral( "z_high" );
  inline const QString P_LOW = QStringLiteral( "p_low" );
  inline const QString P_HIGH = QStringLiteral( "p_high" );
  inline const QString BAND = QStringLiteral( "band" );
  inline const QString BAND_TEXT = QStringLiteral( "band_text" );
  inline const QString STATE = QStringLiteral( "state" );
  inline const QString OVER = QStringLiteral( "over" );
  inline const QString SHORT = QStringLiteral( "short" );
  inline const QString PRESSURE_ZONE = QStringLiteral( "pressure_zone" );
  inline const QString DOUBT = QStringLiteral( "doubt" );
  inline const QString CLOSE_CALL = QStringLiteral( "close_call" );
  inline const QString NODE = QStringLiteral( "node" );
  inline const QString KIND = QStringLiteral( "kind" );
  inline const QString DEGREE = QStringLiteral( "degree" );
  inline const QString Z = QStringLiteral( "z" );
  inline const QString P = QStringLiteral( "p" );
  inline const QString STRETCH = QStringLiteral( "stretch" );
  inline const QString WHAT = QStringLiteral( "what" );
  inline const QString P_WORST = QStringLiteral( "p_worst" );
  inline const QString BEYOND = QStringLiteral( "beyond" );
  inline const QString Z_WORST = QStringLiteral( "z_worst" );
  inline const QString MAINLINES = QStringLiteral( "mainlines" );
  inline const QString LATERALS = QStringLiteral( "laterals" );
  inline const QString LABEL = QStringLiteral( "label" );
  inline const QString DISTANCE_ALONG = QStringLiteral( "distance_along" );
  inline const QString FINDING = QStringLiteral( "finding" );
  inline const QString MESSAGE = QStringLiteral( "message" );
  inline const QString GAP = QStringLiteral( "gap" );
  inline const QString P_FROM = QStringLiteral( "p_from" );
  inline const QString P_TO = QStringLiteral( "p_to" );
  inline const QString AREA = QStringLiteral( "area" );
  inline const QString ELEVATION = QStringLiteral( "elevation" );
  //! Of a drawn feature: names of different value never join.
  inline const QString SYSTEM = QStringLiteral( "system" );
  //! Of a drawn feature: goes before the parameter COVER.
  inline const QString COVER = QStringLiteral( "cover" );
  //! The key that GeoPackage gives by itself.
  inline const QString FID = QStringLiteral( "fid" );
} // namespace stillhead::field

//! Words that stand in fields. The states are core's stateName(), the finding codes core's findingName().
namespace stillhead::word
{
  inline const QString MAINLINE = QStringLiteral( "mainline" );
  inline const QString LATERAL = QStringLiteral( "lateral" );
  inline const QString MAINLINES = QStringLiteral( "mainlines" );
  inline const QString LATERALS = QStringLiteral( "laterals" );
  inline const QString NODE_END = QStringLiteral( "end" );
  inline const QString NODE_JOINT = QStringLiteral( "joint" );
  inline const QString NODE_SOURCE = QStringLiteral( "source" );
  inline const QString STRETCH_OVER = QStringLiteral( "over" );
  inline const QString STRETCH_SHORT = QStringLiteral( "short" );
  inline const QString HIGHEST = QStringLiteral( "highest" );
  inline const QString LOWEST = QStringLiteral( "lowest" );
  inline const QString SUMMIT = QStringLiteral( "summit" );
  inline const QString SAG = QStringLiteral( "sag" );
  inline const QString CEILING = QStringLiteral( "ceiling" );
  inline const QString FLOOR = QStringLiteral( "floor" );
} // namespace stillhead::word
