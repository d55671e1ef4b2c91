// SPDX-License-Identifier: GPL-2.0-or-later
// Fields of a group follow each other in the table, so one pass makes the groups of the form.
#include "processing/newplan/planform.h"

#include <qgsattributeeditorcontainer.h>
#include <qgsattributeeditorfield.h>
#include <qgsdefaultvalue.h>
#include <qgseditformconfig.h>
#include <qgseditorwidgetsetup.h>
#include <qgsfieldconstraints.h>
#include <qgsmemoryproviderutils.h>
#include <qgsoptionalexpression.h>
#include <qgsvectorlayer.h>

#include <QDomDocument>

#include <memory>

namespace stillhead
{

  namespace
  {

    QgsEditorWidgetSetup widgetFor( const PlanField &field )
    {
      if ( field.choices.isEmpty() )
        return QgsEditorWidgetSetup(
          QStringLiteral( "TextEdit" ), { { QStringLiteral( "IsMultiline" ), field.isLong } } );
      QVariantList pairs;
      for ( const PlanChoice &choice : field.choices )
        pairs << QVariantMap { { choice.label, choice.word } };
      return QgsEditorWidgetSetup( QStringLiteral( "ValueMap" ), { { QStringLiteral( "map" ), pairs } } );
    }

    void setField( QgsVectorLayer &layer, int index, const PlanField &field )
    {
      layer.setFieldAlias( index, field.alias );
      layer.setEditorWidgetSetup( index, widgetFor( field ) );
      if ( !field.choices.isEmpty() )
        layer.setDefaultValueDefinition(
          index, QgsDefaultValue( QStringLiteral( "'%1'" ).arg( field.choices.first().word ) ) );
      if ( field.name == QLatin1String( "kind" ) )
        layer.setFieldConstraint( index, QgsFieldConstraints::ConstraintNotNull );
      if ( field.rule.isEmpty() )
        return;
      layer.setConstraintExpression( index, field.rule, field.ruleText );
      layer.setFieldConstraint(
        index, QgsFieldConstraints::ConstraintExpression, QgsFieldConstraints::ConstraintStrengthSoft );
    }

    //! A new group of the form, which \a config takes over.
    QgsAttributeEditorContainer *addGroup( QgsEditFormConfig &config, const PlanField &first )
    {
      auto *group = new QgsAttributeEditorContainer( first.group, nullptr );
      compat::showAsGroupBox( *group );
      if ( !first.groupShown.isEmpty() )
        group->setVisibilityExpression( QgsOptionalExpression( QgsExpression( first.groupShown ) ) );
      config.addTab( group );
      return group;
    }

  } // namespace

  void setPlanForm( QgsVectorLayer &layer, const PlanLayer &plan )
  {
    QgsEditFormConfig config = layer.editFormConfig();
    config.setLayout( compat::FORM_BY_GROUPS );
    config.clearTabs();
    QgsAttributeEditorContainer *group = nullptr;
    for ( const PlanField &field : plan.fields )
    {
      const int index = layer.fields().lookupField( field.name );
      setField( layer, index, field );
      if ( !group || group->name() != field.group )
        group = addGroup( config, field );
      group->addChildElement( new QgsAttributeEditorField( field.name, index, group ) );
    }
    layer.setEditFormConfig( config );
    layer.setDisplayExpression( QStringLiteral( "coalesce( \"name\", '%1 ' || $id )" ).arg( plan.table ) );
  }

  QString planStyleText( const PlanLayer &plan )
  {
    const std::unique_ptr<QgsVectorLayer> layer( QgsMemoryProviderUtils::createMemoryLayer(
      plan.table, plan.plainFields(), plan.type, QgsCoordinateReferenceSystem() ) );
    setPlanForm( *layer, plan );
    setPlanSymbols( *layer, plan );
    QString error;
    QDomDocument qml;
    layer->exportNamedStyle( qml, error );
    return qml.toString();
  }

} // namespace stillhead
