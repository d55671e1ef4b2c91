// SPDX-License-Identifier: GPL-2.0-or-later
// A data-defined COVER is evaluated only for features that have no cover of their own.
#include "processing/reading/coverreader.h"

#include "processing/parameternames.h"
#include "processing/text/text.h"

#include <qgsexception.h>

#include <cmath>

namespace stillhead
{

  namespace
  {

    //! Deeper than any trench for irrigation: a slip of the unit.
    constexpr double DEEP_M = 15.0;

    bool isBlank( const QVariant &value )
    {
      return !value.isValid() || value.isNull() || value.toString().trimmed().isEmpty();
    }

  } // namespace

  CoverReader::CoverReader( const ParameterValues &values, const DisplayUnits &units )
    : mUnits( units )
  {
    if ( QgsProcessingParameters::isDynamic( values.values(), parameter::COVER ) )
    {
      mProperty = values.values().value( parameter::COVER ).value<QgsProperty>();
      mDefault = values.definition( parameter::COVER )->defaultValue().toDouble();
    }
    else
    {
      mDefault = values.number( parameter::COVER );
    }
  }

  void CoverReader::beginLayer( const QgsFields &fields, const QgsExpressionContext &expressions, const QString &what )
  {
    mWhat = what;
    mField = -1;
    for ( int i = 0; i < fields.count() && mField < 0; ++i )
    {
      if ( fields.at( i ).name().compare( field::COVER, Qt::CaseInsensitive ) == 0 )
        mField = i;
    }
    mExpressions = expressions;
    mExpressions.setFields( fields );
    mProperty.prepare( mExpressions );
  }

  double CoverReader::checked( const QVariant &value, const QgsFeature &feature, const QString &origin ) const
  {
    bool isNumber = false;
    const double cover = value.toDouble( &isNumber );
    if ( !isNumber || !std::isfinite( cover ) )
      throw QgsProcessingException(
        Text::tr( "The cover of feature %1 of %2 is “%3” by %4, which is not a number; give a "
                  "number in %5." )
          .arg( feature.id() )
          .arg( mWhat, value.toString(), origin, mUnits.lengthName() ) );
    return cover;
  }

  double CoverReader::coverM( const QgsFeature &feature )
  {
    ++mFeatures;
    double cover = mDefault;
    const QVariant own = mField < 0 ? QVariant() : feature.attribute( mField );
    if ( !isBlank( own ) )
    {
      ++mOwn;
      cover = checked( own, feature, Text::tr( "its field" ) );
    }
    else if ( mProperty.isActive() && mProperty )
    {
      mExpressions.setFeature( feature );
      const QVariant value = mProperty.value( mExpressions );
      if ( !isBlank( value ) )
        cover = checked( value, feature, parameter::COVER );
    }
    const double metres = mUnits.metres( cover );
    mNegative += metres < 0.0 ? 1 : 0;
    mDeep += metres > DEEP_M ? 1 : 0;
    return metres;
  }

  void CoverReader::report( QgsProcessingFeedback &feedback ) const
  {
    if ( mOwn > 0 )
      feedback.pushInfo(
        Text::tr( "%1 of %2 drawn features have a depth of cover of their own (field `cover`); the others "
                  "take COVER." )
          .arg( mOwn )
          .arg( mFeatures ) );
    if ( mNegative > 0 )
      feedback.pushWarning(
        Text::tr( "%1 drawn features have a negative depth of cover: their pipe is taken to lie above ground." )
          .arg( mNegative ) );
    if ( mDeep > 0 )
      feedback.pushWarning( Text::tr( "%1 drawn features have a depth of cover of more than %2; check the unit." )
                              .arg( mDeep )
                              .arg( mUnits.lengthText( DEEP_M ) ) );
  }

} // namespace stillhead
