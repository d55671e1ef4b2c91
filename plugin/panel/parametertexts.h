// SPDX-License-Identifier: GPL-2.0-or-later
// What the main algorithm says of its parameters, so that panel and toolbox explain a value in the same words.
#pragma once

#include <QString>
#include <QStringList>

class QComboBox;
class QWidget;

namespace stillhead
{

  //! The help of the parameter \a name.
  QString parameterHelp( const QString &name );

  //! The choices of the parameter \a name, in their order.
  QStringList parameterChoices( const QString &name );

  //! Lets \a widget explain itself by the help of \a name, to the eye and to a screen reader.
  void explain( QWidget *widget, const QString &name );

  //! A combo box with the choices of \a name, explained.
  QComboBox *choiceBox( const QString &name, QWidget *parent );

} // namespace stillhead
