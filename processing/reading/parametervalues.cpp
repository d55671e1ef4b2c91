// SPDX-License-Identifier: GPL-2.0-or-later
// Values may be plain, or properties (static, or expressions over variables) that are evaluated first.
#include "processing/reading/parametervalues.h"

#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsproperty.h>

#include <algorithm>
#include <cmath>

namespace stillhead
{

  namespace
  {

    //! What the user gave, with properties evaluated.
    QVariant plainValue( const QVariant &given, const QgsProcessingContext &context )
    {
      if ( !given.canConvert<QgsProperty>() )
        return given;
      return given.value<QgsProperty>().value( context.expressionContext() );
    }

    bool isBlank( const QVariant &value )
    {
      return !value.isValid() || value.isNull()
        || ( value.type() == QVariant::String && value.toString().trimmed().isEmpty() );
    }

  } // namespace

  ParameterValues::ParameterValues(
    const QgsProcessingParameterDefinitions &definitions, const QVariantMap &values, QgsProcessingContext &context )
    : mDefinitions( definitions )
    , mValues( values )
    , mContext( context )
  {
  }

  const QgsProcessingParameterDefinition *ParameterValues::definition( const QString &name ) const
  {
    const auto found = std::find_if( mDefinitions.cbegin(), mDefinitions.cend(),
      [&name]( const QgsProcessingParameterDefinition *definition ) { return definition->name() == name; } );
    return found == mDefinitions.cend() ? nullptr : *found;
  }

  bool ParameterValues::isSet( const QString &name ) const
  {
    return !isBlank( plainValue( mValues.value( name ), mContext ) );
  }

  std::optional<double> ParameterValues::optionalNumber( const QString &name ) const
  {
    const QVariant value = plainValue( mValues.value( name ), mContext );
    if ( isBlank( value ) )
      return std::nullopt;
    bool isNumber = false;
    const double result = value.toDouble( &isNumber );
    if ( !isNumber || !std::isfinite( result ) )
      throw QgsProcessingException(
        Text::tr( "%1 is “%2”, which is not a number. Give the number alone, with a point as "
                  "decimal mark; its unit is chosen by PRESSURE_UNIT and LENGTH_UNIT." )
          .arg( name, value.toString() ) );
    return result;
  }

  double ParameterValues::number( const QString &name ) const
  {
    const std::optional<double> given = optionalNumber( name );
    return given ? *given : definition( name )->defaultValue().toDouble();
  }

  int ParameterValues::choice( const QString &name ) const
  {
    const auto *options = dynamic_cast<const QgsProcessingParameterEnum *>( definition( name ) );
    QVariant value = plainValue( mValues.value( name ), mContext );
    if ( isBlank( value ) )
      value = options->defaultValue();
    bool isNumber = false;
    const int result = value.toInt( &isNumber );
    if ( !isNumber || result < 0 || result >= options->options().size() )
    {
      QStringList choices;
      for ( int i = 0; i < options->options().size(); ++i )
        choices << QStringLiteral( "%1 (%2)" ).arg( i ).arg( options->options().at( i ) );
      throw QgsProcessingException( Text::tr( "%1 is “%2”; choose one of %3." )
                                      .arg( name, value.toString(), choices.join( QStringLiteral( ", " ) ) ) );
    }
    return result;
  }

  bool ParameterValues::boolean( const QString &name ) const
  {
    return QgsProcessingParameters::parameterAsBool( definition( name ), mValues, mContext );
  }

  QString ParameterValues::text( const QString &name ) const
  {
    return QgsProcessingParameters::parameterAsString( definition( name ), mValues, mContext ).trimmed();
  }

  void ParameterValues::checkAll() const
  {
    for ( const QgsProcessingParameterDefinition *definition : mDefinitions )
    {
      // A data-defined value is judged feature by feature.
      if ( QgsProcessingParameters::isDynamic( mValues, definition->name() ) )
        continue;
      if ( definition->type() == QgsProcessingParameterNumber::typeName() )
        optionalNumber( definition->name() );
      else if ( definition->type() == QgsProcessingParameterEnum::typeName() )
        choice( definition->name() );
    }
  }

} // namespace stillhead
