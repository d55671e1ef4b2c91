// SPDX-License-Identifier: GPL-2.0-or-later
// Rows in a temporary file: they come one by one while a computation may still fail, and go to a sink once it has not.
#pragma once

#include <qgsfeature.h>

#include <QDataStream>
#include <QTemporaryFile>

#include <cstddef>

namespace stillhead
{

  class RowSpool
  {
    public:
      //! \throws QgsProcessingException where no temporary file can be made
      RowSpool();
      RowSpool( const RowSpool & ) = delete;
      RowSpool &operator=( const RowSpool & ) = delete;

      //! \throws QgsProcessingException where the place for temporary files is full
      void add( const QgsFeature &row );

      std::size_t rows() const { return mRows; }

      //! Back to the first row.
      void rewind();

      //! The next rows, at most \a count; none after the last.
      QgsFeatureList take( int count );

    private:
      QTemporaryFile mFile;
      QDataStream mStream;
      std::size_t mRows = 0;
      std::size_t mTaken = 0;
  };

} // namespace stillhead
