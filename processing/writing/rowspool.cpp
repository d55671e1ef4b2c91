// SPDX-License-Identifier: GPL-2.0-or-later
// Attributes as variants, geometry as WKB.
#include "processing/writing/rowspool.h"

#include "processing/text/text.h"

#include <qgsexception.h>
#include <qgsgeometry.h>

namespace stillhead
{

  RowSpool::RowSpool()
    : mStream( &mFile )
  {
    if ( !mFile.open() )
      throw QgsProcessingException(
        Text::tr( "No temporary file can be made; check the folder for temporary files and run again." ) );
  }

  void RowSpool::add( const QgsFeature &row )
  {
    const QgsAttributes attributes = row.attributes();
    mStream << static_cast<qint32>( attributes.size() );
    for ( const QVariant &attribute : attributes )
      mStream << attribute;
    mStream << row.geometry().asWkb();
    if ( mStream.status() != QDataStream::Ok )
      throw QgsProcessingException(
        Text::tr( "The place for temporary files is full; make room there and run again." ) );
    ++mRows;
  }

  void RowSpool::rewind()
  {
    mFile.seek( 0 );
    mTaken = 0;
  }

  QgsFeatureList RowSpool::take( int count )
  {
    QgsFeatureList rows;
    for ( ; rows.size() < count && mTaken < mRows; ++mTaken )
    {
      qint32 size = 0;
      mStream >> size;
      QgsAttributes attributes;
      for ( qint32 i = 0; i < size; ++i )
      {
        QVariant attribute;
        mStream >> attribute;
        attributes << attribute;
      }
      QByteArray wkb;
      mStream >> wkb;
      QgsGeometry geometry;
      geometry.fromWkb( wkb );
      QgsFeature row;
      row.setAttributes( attributes );
      row.setGeometry( geometry );
      rows.append( row );
    }
    return rows;
  }

} // namespace stillhead
