// SPDX-License-Identifier: GPL-2.0-or-later
// A new result keeps the order that the user has chosen.
#include "plugin/results/resulttab.h"

#include "plugin/results/resulttext.h"

#include <qgsapplication.h>
#include <qgsfileutils.h>

#include <QAction>
#include <QClipboard>
#include <QFileDialog>
#include <QHBoxLayout>
#include <QHeaderView>
#include <QSaveFile>
#include <QSortFilterProxyModel>
#include <QTableView>
#include <QToolButton>
#include <QVBoxLayout>

#include <algorithm>

namespace stillhead
{

  ResultTab::ResultTab( QWidget *parent )
    : QWidget( parent )
    , mModel( new ResultModel( this ) )
    , mSorted( new QSortFilterProxyModel( this ) )
    , mView( new QTableView( this ) )
  {
    mSorted->setSourceModel( mModel );
    mSorted->setSortRole( ResultModel::SORT_ROLE );
    mView->setModel( mSorted );
    mView->setSortingEnabled( true );
    mView->sortByColumn( -1, Qt::AscendingOrder );
    mView->setSelectionBehavior( QAbstractItemView::SelectRows );
    mView->setEditTriggers( QAbstractItemView::NoEditTriggers );
    mView->setTabKeyNavigation( false );
    mView->setAlternatingRowColors( true );
    mView->verticalHeader()->hide();
    mView->horizontalHeader()->setStretchLastSection( true );
    connect( mView, &QTableView::clicked, this, &ResultTab::goTo );
    connect( mView, &QTableView::activated, this, &ResultTab::goTo );

    auto *copyAction = new QAction( tr( "&Copy" ), mView );
    copyAction->setShortcut( QKeySequence::Copy );
    copyAction->setShortcutContext( Qt::WidgetShortcut );
    mView->addAction( copyAction );
    mView->setContextMenuPolicy( Qt::ActionsContextMenu );
    connect( copyAction, &QAction::triggered, this, &ResultTab::copy );

    auto *buttons = new QVBoxLayout();
    const auto addButton = [this, buttons]( const QString &icon, const QString &text ) {
      auto *button = new QToolButton( this );
      button->setIcon( QgsApplication::getThemeIcon( icon ) );
      button->setToolTip( text );
      button->setAccessibleName( text );
      button->setAutoRaise( true );
      buttons->addWidget( button );
      return button;
    };
    connect( addButton( QStringLiteral( "/mActionEditCopy.svg" ), tr( "Copy the selected rows, or all" ) ),
      &QToolButton::clicked, this, &ResultTab::copy );
    connect( addButton( QStringLiteral( "/mActionFileSave.svg" ), tr( "Save the list as CSV…" ) ),
      &QToolButton::clicked, this, &ResultTab::askForCsv );
    buttons->addStretch( 1 );
    auto *row = new QHBoxLayout( this );
    row->setContentsMargins( 0, 0, 0, 0 );
    row->addLayout( buttons );
    row->addWidget( mView, 1 );
  }

  void ResultTab::setList( const ResultList &list )
  {
    const bool isFirst = mModel->list().headings.isEmpty();
    mModel->setList( list );
    if ( isFirst )
      mView->resizeColumnsToContents();
  }

  void ResultTab::goTo( const QModelIndex &shown )
  {
    const int row = mSorted->mapToSource( shown ).row();
    if ( row < 0 || row >= mModel->list().rows.size() )
      return;
    const QgsGeometry place = mModel->list().rows.at( row ).place;
    if ( place.isNull() )
      emit said( tr( "This row has no place on the map." ), false );
    else
      emit placeChosen( place );
  }

  void ResultTab::copy() const
  {
    QModelIndexList chosen = mView->selectionModel()->selectedRows();
    std::sort( chosen.begin(), chosen.end() );
    QVector<int> rows;
    for ( const QModelIndex &index : std::as_const( chosen ) )
      rows << mSorted->mapToSource( index ).row();
    for ( int row = 0; chosen.isEmpty() && row < mSorted->rowCount(); ++row )
      rows << mSorted->mapToSource( mSorted->index( row, 0 ) ).row();
    QgsApplication::clipboard()->setText( clipboardText( mModel->list(), rows ) );
  }

  QString ResultTab::saveCsv( const QString &path ) const
  {
    QSaveFile file( path );
    const bool saved =
      file.open( QIODevice::WriteOnly ) && file.write( csvText( mModel->list() ).toUtf8() ) >= 0 && file.commit();
    return saved ? QString() : tr( "“%1” could not be written: %2" ).arg( path, file.errorString() );
  }

  void ResultTab::askForCsv()
  {
    QString path = QFileDialog::getSaveFileName( this, tr( "Save the list" ), QString(), tr( "CSV (*.csv)" ) );
    if ( path.isEmpty() )
      return;
    path = QgsFileUtils::ensureFileNameHasExtension( path, { QStringLiteral( "csv" ) } );
    const QString problem = saveCsv( path );
    emit said( problem.isEmpty() ? tr( "Saved “%1”." ).arg( path ) : problem, !problem.isEmpty() );
  }

} // namespace stillhead
