// SPDX-License-Identifier: GPL-2.0-or-later
// The n-th field of a name in one layer joins the n-th of that name in the other. Types that differ become text, save
// whole numbers of two sizes; types that few formats can hold become text too.
#include "processing/writing/drawnfields.h"

#include "processing/parameternames.h"
#include "processing/qgiscompat.h"

#include <qgsjsonutils.h>

#include <QMap>
#include <QSet>

namespace stillhead
{

  namespace
  {

    int typeOf( const QgsField &field )
    {
      return static_cast<int>( field.type() );
    }

    bool isWhole( int type )
    {
      return type == QMetaType::Int || type == QMetaType::UInt || type == QMetaType::LongLong;
    }

    bool isPlain( int type )
    {
      return isWhole( type ) || type == QMetaType::Double || type == QMetaType::Bool || type == QMetaType::QString
        || type == QMetaType::QDate || type == QMetaType::QDateTime;
    }

    QgsField textField( const QgsField &like )
    {
      QgsField field( like.name(), compat::Field::String );
      field.setAlias( like.alias() );
      field.setComment( like.comment() );
      return field;
    }

    QgsField outputField( const QgsField &drawn )
    {
      if ( !isPlain( typeOf( drawn ) ) )
        return textField( drawn );
      QgsField field(
        drawn.name(), drawn.type(), drawn.typeName(), drawn.length(), drawn.precision(), drawn.comment() );
      field.setAlias( drawn.alias() );
      return field;
    }

    //! A field that holds the values of both.
    QgsField joined( const QgsField &first, const QgsField &second )
    {
      if ( typeOf( first ) == typeOf( second ) )
      {
        QgsField field = first;
        // 0 stands for no limit.
        field.setLength(
          first.length() == 0 || second.length() == 0 ? 0 : std::max( first.length(), second.length() ) );
        field.setPrecision( std::max( first.precision(), second.precision() ) );
        return field;
      }
      if ( isWhole( typeOf( first ) ) && isWhole( typeOf( second ) ) )
      {
        QgsField field( first.name(), compat::Field::LongLong );
        field.setAlias( first.alias() );
        return field;
      }
      return textField( first );
    }

    bool isKey( const DrawnLayerFields &layer, int index )
    {
      return layer.keys.contains( index )
        && layer.fields.at( index ).name().compare( field::FID, Qt::CaseInsensitive ) == 0;
    }

    QString asText( const QVariant &value )
    {
      return value.canConvert<QString>() ? value.toString() : QgsJsonUtils::encodeValue( value );
    }

  } // namespace

  DrawnFields::DrawnFields( const std::vector<DrawnLayerFields> &layers, const QStringList &reserved )
  {
    // Fields by name and by how often the name came before in the same layer.
    QMap<QPair<QString, int>, int> known;
    std::vector<QgsField> fields;
    for ( const DrawnLayerFields &layer : layers )
    {
      QMap<QString, int> seen;
      std::vector<int> targets( static_cast<std::size_t>( layer.fields.count() ), -1 );
      for ( int i = 0; i < layer.fields.count(); ++i )
      {
        if ( isKey( layer, i ) )
          continue;
        const QgsField field = outputField( layer.fields.at( i ) );
        const QString name = field.name().toLower();
        const QPair<QString, int> key( name, seen[name]++ );
        if ( known.contains( key ) )
        {
          QgsField &own = fields[static_cast<std::size_t>( known.value( key ) )];
          own = joined( own, field );
        }
        else
        {
          known.insert( key, static_cast<int>( fields.size() ) );
          fields.push_back( field );
        }
        targets[static_cast<std::size_t>( i )] = known.value( key );
      }
      mTargets.push_back( targets );
    }

    // Names that stay as they are come first, so that no renamed one takes theirs.
    // Many formats make a key of this name by themselves.
    QSet<QString> taken { field::FID };
    for ( const QString &name : reserved )
      taken << name.toLower();
    std::vector<bool> keeps;
    for ( const QgsField &field : fields )
    {
      const QString name = field.name().toLower();
      keeps.push_back( !taken.contains( name ) );
      taken << name;
    }
    for ( std::size_t i = 0; i < fields.size(); ++i )
    {
      QgsField &field = fields[i];
      if ( !keeps[i] )
      {
        const QString drawn = field.name();
        QString name = drawn + QStringLiteral( "_drawn" );
        for ( int number = 2; taken.contains( name.toLower() ); ++number )
          name = QStringLiteral( "%1_drawn_%2" ).arg( drawn ).arg( number );
        taken << name.toLower();
        field.setName( name );
        mRenamed << QStringLiteral( "%1 → %2" ).arg( drawn, name );
      }
      mFields.append( field );
    }
  }

  QgsAttributes DrawnFields::attributes( const QgsAttributes &drawn, std::size_t layer ) const
  {
    QgsAttributes result( mFields.count() );
    const std::vector<int> &targets = mTargets[layer];
    for ( int i = 0; i < drawn.count() && static_cast<std::size_t>( i ) < targets.size(); ++i )
    {
      const int target = targets[static_cast<std::size_t>( i )];
      const QVariant &value = drawn.at( i );
      if ( target < 0 || value.isNull() )
        continue;
      const int type = typeOf( mFields.at( target ) );
      if ( value.userType() == type )
        result[target] = value;
      else if ( type == QMetaType::QString )
        result[target] = asText( value );
      else
      {
        QVariant converted = value;
        converted.convert( type );
        result[target] = converted;
      }
    }
    return result;
  }

} // namespace stillhead
