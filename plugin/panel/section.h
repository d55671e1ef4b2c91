// SPDX-License-Identifier: GPL-2.0-or-later
// A part of the panel: it folds away under a line that sums it up, fills its share of the parameters and shows it.
#pragma once

#include "plugin/panel/quantityedit.h"

#include <qgscollapsiblegroupbox.h>

#include <QFormLayout>
#include <QVariantMap>
#include <QVector>

class QComboBox;
class QLabel;

namespace stillhead
{

  class Section : public QgsCollapsibleGroupBoxBasic
  {
      Q_OBJECT

    public:
      Section( const QString &title, const DisplayUnits &units, QWidget *parent );

      //! Writes what is set here into \a parameters; blank values are left out.
      void fill( QVariantMap &parameters ) const;

      //! Shows what \a parameters hold; what they do not hold becomes blank. Says nothing of it.
      void showParameters( const QVariantMap &parameters );

      //! Converts what is shown.
      virtual void setUnits( const DisplayUnits &units );

      //! The line that stands behind the title while folded.
      void setSummary( const QString &summary );

      //! Does not grow with the title, which is shortened where there is no room.
      QSize minimumSizeHint() const override;

    signals:
      //! The user has changed something here.
      void edited();

    protected:
      const DisplayUnits &units() const { return mUnits; }

      //! Adds a row with a field for the parameter \a name.
      QuantityEdit *addQuantity( const QString &label, const QString &name, QuantityEdit::Quantity quantity );

      //! Adds a row with the choices of \a name.
      QComboBox *addChoice( const QString &label, const QString &name );

      //! Adds a row with a text for the parameter \a name.
      QLineEdit *addText( const QString &label, const QString &name );

      //! Adds a row of any kind, which the subclass fills and shows itself.
      void addRow( const QString &label, QWidget *widget );

      //! Adds a line of text under the rows.
      QLabel *addNote();

      //! What other widgets hold, for those that are no quantity, choice or text.
      virtual void fillMore( QVariantMap &parameters ) const { static_cast<void>( parameters ); }
      virtual void showMore( const QVariantMap &parameters ) { static_cast<void>( parameters ); }

      void resizeEvent( QResizeEvent *event ) override;

    private:
      void showTitle();

      QString mTitle;
      QString mSummary;
      DisplayUnits mUnits;
      QFormLayout *mRows = nullptr;
      QVector<QuantityEdit *> mQuantities; //!< their object names are the parameters'
      QVector<QComboBox *> mChoices;
      QVector<QLineEdit *> mTexts;
  };

} // namespace stillhead
