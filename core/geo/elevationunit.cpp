// SPDX-License-Identifier: GPL-2.0-or-later
// Band units are free text: the spellings that raster writers are known to use are read, case and stops aside.
#include "core/geo/elevationunit.h"

#include "core/geo/crs.h"

#include <cctype>
#include <cmath>
#include <map>

namespace stillhead
{

  namespace
  {
    constexpr double CENTIMETRE = 0.01;
    constexpr double DECIMETRE = 0.1;
    constexpr double MILLIMETRE = 0.001;

    //! Letters and digits only, in lower case: "US survey foot", "us_survey_foot" and "U.S. Survey Foot" are one.
    std::string plain( const std::string &text )
    {
      std::string result;
      for ( const char c : text )
      {
        if ( std::isalnum( static_cast<unsigned char>( c ) ) )
          result += static_cast<char>( std::tolower( static_cast<unsigned char>( c ) ) );
      }
      return result;
    }

    const std::map<std::string, double> &spellings()
    {
      static const std::map<std::string, double> table { { "m", 1.0 }, { "metre", 1.0 }, { "metres", 1.0 },
        { "meter", 1.0 }, { "meters", 1.0 }, { "mtr", 1.0 }, { "ft", METRES_PER_FOOT }, { "foot", METRES_PER_FOOT },
        { "feet", METRES_PER_FOOT }, { "internationalfoot", METRES_PER_FOOT }, { "internationalfeet", METRES_PER_FOOT },
        { "intlfoot", METRES_PER_FOOT }, { "footinternational", METRES_PER_FOOT },
        { "feetinternational", METRES_PER_FOOT }, { "ftint", METRES_PER_FOOT }, { "ftinternational", METRES_PER_FOOT },
        { "ftintl", METRES_PER_FOOT }, { "ift", METRES_PER_FOOT }, { "usft", METRES_PER_US_SURVEY_FOOT },
        { "ftus", METRES_PER_US_SURVEY_FOOT }, { "footus", METRES_PER_US_SURVEY_FOOT },
        { "feetus", METRES_PER_US_SURVEY_FOOT }, { "usfoot", METRES_PER_US_SURVEY_FOOT },
        { "usfeet", METRES_PER_US_SURVEY_FOOT }, { "ussurveyfoot", METRES_PER_US_SURVEY_FOOT },
        { "ussurveyfeet", METRES_PER_US_SURVEY_FOOT }, { "ussurveyft", METRES_PER_US_SURVEY_FOOT },
        { "surveyfoot", METRES_PER_US_SURVEY_FOOT }, { "surveyfeet", METRES_PER_US_SURVEY_FOOT },
        { "sft", METRES_PER_US_SURVEY_FOOT }, { "footussurvey", METRES_PER_US_SURVEY_FOOT },
        { "feetussurvey", METRES_PER_US_SURVEY_FOOT }, { "ftussurvey", METRES_PER_US_SURVEY_FOOT }, { "dm", DECIMETRE },
        { "decimetre", DECIMETRE }, { "decimetres", DECIMETRE }, { "decimeter", DECIMETRE },
        { "decimeters", DECIMETRE }, { "cm", CENTIMETRE }, { "centimetre", CENTIMETRE }, { "centimetres", CENTIMETRE },
        { "centimeter", CENTIMETRE }, { "centimeters", CENTIMETRE }, { "mm", MILLIMETRE }, { "millimetre", MILLIMETRE },
        { "millimetres", MILLIMETRE }, { "millimeter", MILLIMETRE }, { "millimeters", MILLIMETRE } };
      return table;
    }

    //! One name for each unit, whatever the raster calls it. The two feet differ by 2 ppm: compared well below that.
    std::string nameOf( double metresPerUnit, const std::string &otherwise )
    {
      const auto is = [metresPerUnit]( double unit ) { return std::abs( metresPerUnit / unit - 1.0 ) < 1e-9; };
      if ( is( 1.0 ) )
        return "metre";
      if ( is( METRES_PER_FOOT ) )
        return "foot";
      if ( is( METRES_PER_US_SURVEY_FOOT ) )
        return "US survey foot";
      if ( is( DECIMETRE ) )
        return "decimetre";
      if ( is( CENTIMETRE ) )
        return "centimetre";
      return is( MILLIMETRE ) ? "millimetre" : otherwise;
    }
  } // namespace

  std::optional<double> metresPerUnitText( const std::string &text )
  {
    const auto found = spellings().find( plain( text ) );
    return found == spellings().end() ? std::nullopt : std::optional<double>( found->second );
  }

  ElevationUnitDecision decideElevationUnit(
    std::optional<ElevationUnit> given, const std::string &bandText, const std::string &crsDefinition )
  {
    ElevationUnitDecision decision;
    decision.bandText = bandText;
    if ( given )
    {
      decision.metresPerUnit = metresPer( *given );
      decision.unitName = nameOf( decision.metresPerUnit, "" );
      decision.origin = ElevationUnitOrigin::Given;
    }
    else if ( const std::optional<double> band = metresPerUnitText( bandText ) )
    {
      decision.metresPerUnit = *band;
      decision.unitName = nameOf( *band, bandText );
      decision.origin = ElevationUnitOrigin::Band;
    }
    else if ( const std::optional<VerticalUnit> up = verticalUnit( crsDefinition ) )
    {
      decision.metresPerUnit = up->metres;
      decision.unitName = nameOf( up->metres, up->name );
      decision.origin = ElevationUnitOrigin::Crs;
    }
    return decision;
  }

} // namespace stillhead
