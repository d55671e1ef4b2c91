// SPDX-License-Identifier: GPL-2.0-or-later
// A file that gets its name only when it is whole: written beside its destination under a name of its own, renamed at
// the end, removed if that end is not reached.
#pragma once

#include <string>

namespace stillhead
{

  class PendingFile
  {
    public:
      explicit PendingFile( std::string destination );
      ~PendingFile();
      PendingFile( const PendingFile & ) = delete;
      PendingFile &operator=( const PendingFile & ) = delete;

      //! Where to write meanwhile; same folder, same extension.
      const std::string &path() const { return mPath; }

      /**
       * Puts the file in its place, over an earlier one; what GDAL kept beside that one (statistics, overviews) goes with it.
       * \throws std::runtime_error where that fails; the earlier file stays then
       */
      void commit();

    private:
      std::string mDestination;
      std::string mPath;
      bool mIsCommitted = false;
  };

} // namespace stillhead
