// SPDX-License-Identifier: GPL-2.0-or-later
// Rules are advice (soft): a plan is drawn first and filled in later. Only the kind of a source or device is demanded.
#include "processing/newplan/planlayers.h"

#include "processing/text/text.h"

namespace stillhead
{

  namespace
  {

    //! Inside diameters are never spoken of in feet or metres.
    QString diameterUnit( const DisplayUnits &units )
    {
      return units.lengthUnit() == LengthUnit::Foot ? QStringLiteral( "in" ) : QStringLiteral( "mm" );
    }

    //! Fills in the lists of fields, with the unit in every alias that needs one.
    class FieldWriter
    {
      public:
        explicit FieldWriter( const DisplayUnits &units )
          : mUnits( units )
        {
        }

        QVector<PlanField> fields;

        void beginGroup( const QString &heading, const QString &shown = QString() )
        {
          mGroup = heading;
          mShown = shown;
        }

        PlanField &text( const char *name, const QString &alias )
        {
          PlanField &field = add( name, alias );
          field.isText = true;
          return field;
        }

        PlanField &pressure( const char *name, const QString &alias )
        {
          return add( name, QStringLiteral( "%1, %2" ).arg( alias, mUnits.pressureName() ) );
        }

        PlanField &length( const char *name, const QString &alias )
        {
          return add( name, QStringLiteral( "%1, %2" ).arg( alias, mUnits.lengthName() ) );
        }

        PlanField &number( const char *name, const QString &alias ) { return add( name, alias ); }

        void kind( const QVector<PlanChoice> &choices )
        {
          PlanField &field = text( "kind", Text::tr( "Kind" ) );
          field.choices = choices;
        }

      private:
        PlanField &add( const char *name, const QString &alias )
        {
          PlanField field;
          field.name = QString::fromLatin1( name );
          field.alias = alias;
          field.group = mGroup;
          field.groupShown = mShown;
          fields << field;
          return fields.last();
        }

        const DisplayUnits &mUnits;
        QString mGroup;
        QString mShown;
    };

    void setRule( PlanField &field, const QString &rule, const QString &text )
    {
      field.rule = rule;
      field.ruleText = text;
    }

    void notNegative( PlanField &field )
    {
      setRule( field, QStringLiteral( "\"%1\" is null or \"%1\" >= 0" ).arg( field.name ),
        Text::tr( "Not below zero; leave it blank where it is not known." ) );
    }

    void addNameAndSystem( FieldWriter &writer )
    {
      writer.text( "name", Text::tr( "Name" ) );
      writer.text( "system", Text::tr( "System (lines of different systems never join)" ) );
    }

    void addPump( FieldWriter &writer )
    {
      notNegative( writer.pressure( "boost", Text::tr( "Pressure added at no flow" ) ) );
      setRule( writer.pressure( "boost_low", Text::tr( "Pressure added while running" ) ),
        QStringLiteral( "\"boost_low\" is null or ( \"boost_low\" >= 0 and \"boost_low\" <= \"boost\" )" ),
        Text::tr( "Not above what is added at no flow, which has to be given too." ) );
    }

    QVector<PlanField> pipeFields( const DisplayUnits &units )
    {
      FieldWriter writer( units );
      writer.beginGroup( Text::tr( "Pipe" ) );
      addNameAndSystem( writer );
      notNegative( writer.length( "cover", Text::tr( "Depth of cover, ground down to the top of the pipe" ) ) );
      notNegative( writer.pressure( "rating", Text::tr( "Pressure rating" ) ) );
      notNegative( writer.number(
        "inside_diameter", QStringLiteral( "%1, %2" ).arg( Text::tr( "Inside diameter" ), diameterUnit( units ) ) ) );
      return writer.fields;
    }

    QVector<PlanField> sourceFields( const DisplayUnits &units )
    {
      FieldWriter writer( units );
      writer.beginGroup( Text::tr( "Source" ) );
      addNameAndSystem( writer );
      writer.kind( { { QStringLiteral( "pressure reading" ), Text::tr( "pressure read on a gauge" ) },
        { QStringLiteral( "water level" ), Text::tr( "water level as elevation" ) },
        { QStringLiteral( "level above ground" ), Text::tr( "water level above ground" ) } } );
      const QString unit =
        Text::tr( "%1 for a reading, %2 for a level" ).arg( units.pressureName(), units.lengthName() );
      setRule( writer.number(
                 "value", QStringLiteral( "%1, %2" ).arg( Text::tr( "High value (night, winter, tank full)" ), unit ) ),
        QStringLiteral( "\"value\" is not null" ), Text::tr( "The highest that the source gives at rest." ) );
      setRule(
        writer.number( "low", QStringLiteral( "%1, %2" ).arg( Text::tr( "Low value (summer peak, tank low)" ), unit ) ),
        QStringLiteral( "\"low\" is null or \"low\" <= \"value\"" ), Text::tr( "Not above the high value." ) );
      writer.length( "elevation", Text::tr( "Surveyed ground elevation" ) );
      writer.beginGroup( Text::tr( "Gauge" ), QStringLiteral( "\"kind\" = 'pressure reading'" ) );
      writer.length( "gauge_height", Text::tr( "Height of the gauge above ground" ) );
      writer.beginGroup( Text::tr( "Pump at the source" ) );
      addPump( writer );
      writer.beginGroup( Text::tr( "Note" ) );
      writer.text( "note", Text::tr( "Who read it, when and where" ) ).isLong = true;
      return writer.fields;
    }

    QVector<PlanField> deviceFields( const DisplayUnits &units )
    {
      FieldWriter writer( units );
      writer.beginGroup( Text::tr( "Device" ) );
      addNameAndSystem( writer );
      writer.kind( { { QStringLiteral( "regulator" ), Text::tr( "regulator (pressure-reducing valve)" ) },
        { QStringLiteral( "booster" ), Text::tr( "booster" ) },
        { QStringLiteral( "check valve" ), Text::tr( "check valve" ) },
        { QStringLiteral( "closed valve" ), Text::tr( "closed valve" ) },
        { QStringLiteral( "control valve" ), Text::tr( "control valve" ) } } );
      writer.beginGroup( Text::tr( "Regulator" ), QStringLiteral( "\"kind\" in ( 'regulator', 'control valve' )" ) );
      setRule( writer.pressure( "set", Text::tr( "Set, water running" ) ),
        QStringLiteral( "coalesce( \"kind\", '' ) <> 'regulator' or \"set\" > 0" ),
        Text::tr( "A regulator needs its outlet pressure while water runs." ) );
      notNegative( writer.pressure( "rise", Text::tr( "Lock-up rise" ) ) );
      writer.beginGroup( Text::tr( "Booster" ), QStringLiteral( "\"kind\" = 'booster'" ) );
      addPump( writer );
      writer.beginGroup( Text::tr( "Survey" ) );
      writer.length( "elevation", Text::tr( "Surveyed elevation" ) );
      writer.beginGroup(
        Text::tr( "One way" ), QStringLiteral( "\"kind\" in ( 'regulator', 'booster', 'check valve' )" ) );
      PlanField &direction = writer.text( "direction", Text::tr( "Direction of flow" ) );
      direction.choices = { { QStringLiteral( "from the source" ), Text::tr( "away from the source" ) },
        { QStringLiteral( "start to end" ), Text::tr( "as the pipe is drawn, start to end" ) },
        { QStringLiteral( "end to start" ), Text::tr( "against the drawn pipe, end to start" ) } };
      return writer.fields;
    }

  } // namespace

  QgsFields PlanLayer::plainFields() const
  {
    QgsFields plain;
    for ( const PlanField &field : fields )
      plain.append( QgsField( field.name, field.isText ? compat::Field::String : compat::Field::Double ) );
    return plain;
  }

  QVector<PlanLayer> planLayers( const DisplayUnits &units )
  {
    const compat::WkbType line = compat::WkbType::LineString;
    const compat::WkbType point = compat::WkbType::Point;
    return { { PlanLayerKind::Devices, QStringLiteral( "devices" ), Text::tr( "Devices" ), point,
               deviceFields( units ) },
      { PlanLayerKind::Sources, QStringLiteral( "sources" ), Text::tr( "Sources" ), point, sourceFields( units ) },
      { PlanLayerKind::Mainlines, QStringLiteral( "mainlines" ), Text::tr( "Mainlines" ), line, pipeFields( units ) },
      { PlanLayerKind::Laterals, QStringLiteral( "laterals" ), Text::tr( "Laterals" ), line, pipeFields( units ) } };
  }

} // namespace stillhead
