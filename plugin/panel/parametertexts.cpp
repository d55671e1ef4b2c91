// SPDX-License-Identifier: GPL-2.0-or-later
// The algorithm is made once; its definitions do not change.
#include "plugin/panel/parametertexts.h"

#include "processing/staticpressurealgorithm.h"

#include <QComboBox>
#include <QWidget>

#include <memory>

namespace stillhead
{

  namespace
  {

    const QgsProcessingParameterDefinition *definitionOf( const QString &name )
    {
      static const std::unique_ptr<QgsProcessingAlgorithm> algorithm( StaticPressureAlgorithm().create() );
      return algorithm->parameterDefinition( name );
    }

  } // namespace

  QString parameterHelp( const QString &name )
  {
    const QgsProcessingParameterDefinition *definition = definitionOf( name );
    return definition ? definition->help() : QString();
  }

  QStringList parameterChoices( const QString &name )
  {
    const auto *choice = dynamic_cast<const QgsProcessingParameterEnum *>( definitionOf( name ) );
    return choice ? choice->options() : QStringList();
  }

  void explain( QWidget *widget, const QString &name )
  {
    // Rich text, so that long help is wrapped.
    widget->setToolTip( QStringLiteral( "<p>%1</p>" ).arg( parameterHelp( name ).toHtmlEscaped() ) );
    widget->setAccessibleDescription( parameterHelp( name ) );
    widget->setObjectName( name );
  }

  QComboBox *choiceBox( const QString &name, QWidget *parent )
  {
    auto *box = new QComboBox( parent );
    box->addItems( parameterChoices( name ) );
    box->setSizeAdjustPolicy( QComboBox::AdjustToMinimumContentsLengthWithIcon );
    box->setMinimumContentsLength( 8 );
    explain( box, name );
    return box;
  }

} // namespace stillhead
