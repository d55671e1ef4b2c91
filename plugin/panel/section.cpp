// SPDX-License-Identifier: GPL-2.0-or-later
// Rows wrap where the panel is narrow, so that nothing needs to be scrolled sideways.
#include "plugin/panel/section.h"

#include "plugin/panel/parametertexts.h"

#include <QComboBox>
#include <QLabel>

#include <algorithm>

namespace stillhead
{

  Section::Section( const QString &title, const DisplayUnits &units, QWidget *parent )
    : QgsCollapsibleGroupBoxBasic( title, parent )
    , mTitle( title )
    , mUnits( units )
    , mRows( new QFormLayout( this ) )
  {
    mRows->setRowWrapPolicy( QFormLayout::WrapLongRows );
    mRows->setFieldGrowthPolicy( QFormLayout::ExpandingFieldsGrow );
    connect( this, &QgsCollapsibleGroupBoxBasic::collapsedStateChanged, this, &Section::showTitle );
  }

  void Section::setSummary( const QString &summary )
  {
    mSummary = summary;
    showTitle();
  }

  void Section::showTitle()
  {
    const bool isSummedUp = isCollapsed() && !mSummary.isEmpty();
    const QString full = isSummedUp ? tr( "%1: %2" ).arg( mTitle, mSummary ) : mTitle;
    const int forArrow = 3 * fontMetrics().height();
    setTitle( fontMetrics().elidedText( full, Qt::ElideRight, std::max( width() - forArrow, 4 * forArrow ) ) );
    setToolTip( isSummedUp ? mSummary : QString() );
  }

  QSize Section::minimumSizeHint() const
  {
    const QSize size = QgsCollapsibleGroupBoxBasic::minimumSizeHint();
    return QSize( std::min( size.width(), layout()->totalMinimumSize().width() ), size.height() );
  }

  void Section::resizeEvent( QResizeEvent *event )
  {
    QgsCollapsibleGroupBoxBasic::resizeEvent( event );
    showTitle();
  }

  void Section::addRow( const QString &label, QWidget *widget )
  {
    auto *caption = new QLabel( label, this );
    caption->setBuddy( widget );
    caption->setToolTip( widget->toolTip() );
    mRows->addRow( caption, widget );
    QString plain = label;
    widget->setAccessibleName( plain.remove( '&' ) );
  }

  QuantityEdit *Section::addQuantity( const QString &label, const QString &name, QuantityEdit::Quantity quantity )
  {
    auto *edit = new QuantityEdit( quantity, mUnits, this );
    explain( edit, name );
    addRow( label, edit );
    connect( edit, &QuantityEdit::edited, this, &Section::edited );
    mQuantities << edit;
    return edit;
  }

  QComboBox *Section::addChoice( const QString &label, const QString &name )
  {
    QComboBox *box = choiceBox( name, this );
    addRow( label, box );
    connect( box, QOverload<int>::of( &QComboBox::activated ), this, &Section::edited );
    mChoices << box;
    return box;
  }

  QLineEdit *Section::addText( const QString &label, const QString &name )
  {
    auto *edit = new QLineEdit( this );
    explain( edit, name );
    addRow( label, edit );
    connect( edit, &QLineEdit::textEdited, this, &Section::edited );
    mTexts << edit;
    return edit;
  }

  QLabel *Section::addNote()
  {
    auto *note = new QLabel( this );
    note->setWordWrap( true );
    note->setTextInteractionFlags( Qt::TextSelectableByMouse );
    mRows->addRow( note );
    return note;
  }

  void Section::setUnits( const DisplayUnits &units )
  {
    mUnits = units;
    for ( QuantityEdit *edit : std::as_const( mQuantities ) )
      edit->setUnits( units );
  }

  void Section::fill( QVariantMap &parameters ) const
  {
    const auto insert = [&parameters]( const QString &name, const QString &text ) {
      if ( !text.isEmpty() )
        parameters.insert( name, text );
    };
    for ( const QuantityEdit *edit : mQuantities )
    {
      // What cannot be used at all, for now, is not handed on.
      if ( edit->isEnabledTo( this ) )
        insert( edit->objectName(), edit->parameterText() );
    }
    for ( const QComboBox *box : mChoices )
      insert( box->objectName(), QString::number( box->currentIndex() ) );
    for ( const QLineEdit *edit : mTexts )
      insert( edit->objectName(), edit->text().trimmed() );
    fillMore( parameters );
  }

  void Section::showParameters( const QVariantMap &parameters )
  {
    for ( QComboBox *box : std::as_const( mChoices ) )
      box->setCurrentIndex( parameters.value( box->objectName(), 0 ).toInt() );
    showMore( parameters );
    for ( QuantityEdit *edit : std::as_const( mQuantities ) )
      edit->setParameterText( parameters.value( edit->objectName() ).toString() );
    for ( QLineEdit *edit : std::as_const( mTexts ) )
      edit->setText( parameters.value( edit->objectName() ).toString() );
  }

} // namespace stillhead
