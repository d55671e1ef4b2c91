// SPDX-License-Identifier: GPL-2.0-or-later
// Reads single parameter values and refuses what is not one with a sentence of our own: the platform reads "65 psi" as
// 0 and an unset optional number as 0 too.
#pragma once

#include <qgsprocessingcontext.h>
#include <qgsprocessingparameters.h>

#include <optional>

namespace stillhead
{

  //! A run's parameters, with the definitions that say how to read them.
  class ParameterValues
  {
    public:
      ParameterValues( const QgsProcessingParameterDefinitions &definitions, const QVariantMap &values,
        QgsProcessingContext &context );

      const QVariantMap &values() const { return mValues; }
      QgsProcessingContext &context() const { return mContext; }
      const QgsProcessingParameterDefinition *definition( const QString &name ) const;

      //! True where the user gave something that is not blank.
      bool isSet( const QString &name ) const;

      /**
       * A number if it is set.
       * \throws QgsProcessingException where it is no finite number
       */
      std::optional<double> optionalNumber( const QString &name ) const;

      //! A number, or the definition's default.
      double number( const QString &name ) const;

      /**
       * A choice by its number.
       * \throws QgsProcessingException where there is no such choice
       */
      int choice( const QString &name ) const;

      bool boolean( const QString &name ) const;
      QString text( const QString &name ) const;

      //! Reads every number and choice among the definitions, to refuse early what cannot be read.
      void checkAll() const;

    private:
      QgsProcessingParameterDefinitions mDefinitions;
      const QVariantMap &mValues;
      QgsProcessingContext &mContext;
  };

} // namespace stillhead
