// SPDX-License-Identifier: GPL-2.0-or-later
// While one of these lives, what GDAL complains of in this thread is kept for our own sentence and goes nowhere else.
#pragma once

#include <string>

#include <cpl_error.h>

namespace stillhead
{

  class GdalErrors
  {
    public:
      GdalErrors() { CPLPushErrorHandlerEx( &GdalErrors::keep, this ); }
      ~GdalErrors() { CPLPopErrorHandler(); }
      GdalErrors( const GdalErrors & ) = delete;
      GdalErrors &operator=( const GdalErrors & ) = delete;

      //! The first failure, which is the cause of those that follow; blank if there was none.
      const std::string &text() const { return mText; }

      //! " (the failure)", or nothing.
      std::string inParentheses() const { return mText.empty() ? std::string() : " (" + mText + ")"; }

    private:
      static void CPL_STDCALL keep( CPLErr level, CPLErrorNum, const char *message )
      {
        auto *self = static_cast<GdalErrors *>( CPLGetErrorHandlerUserData() );
        if ( level >= CE_Failure && self->mText.empty() )
          self->mText = message;
      }

      std::string mText;
  };

} // namespace stillhead
