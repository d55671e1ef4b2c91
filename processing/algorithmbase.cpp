// SPDX-License-Identifier: GPL-2.0-or-later
// Core throws its own types; only here they meet the platform's.
#include "processing/algorithmbase.h"

#include "core/feedback/monitor.h"
#include "processing/text/text.h"

#include <qgsexception.h>

#include <QIcon>

#include <new>
#include <stdexcept>

namespace stillhead
{

  QIcon AlgorithmBase::icon() const
  {
    return QIcon( svgIconPath() );
  }

  QString AlgorithmBase::svgIconPath() const
  {
    return QStringLiteral( ":/stillhead/stillhead.svg" );
  }

  bool AlgorithmBase::checkParameterValues(
    const QVariantMap &parameters, QgsProcessingContext &context, QString *message ) const
  {
    try
    {
      valuesOf( parameters, context ).checkAll();
    }
    catch ( const QgsProcessingException &e )
    {
      if ( message )
        *message = e.what();
      return false;
    }
    return QgsProcessingAlgorithm::checkParameterValues( parameters, context, message );
  }

  void AlgorithmBase::addParameters( ParameterList list )
  {
    for ( ParameterPointer &parameter : list )
      addParameter( parameter.release() );
  }

  void AlgorithmBase::addNumberOutputs( const std::vector<std::pair<QString, QString>> &outputs )
  {
    for ( const auto &[name, description] : outputs )
      addOutput( new QgsProcessingOutputNumber( name, description ) );
  }

  ParameterValues AlgorithmBase::valuesOf( const QVariantMap &parameters, QgsProcessingContext &context ) const
  {
    return ParameterValues( parameterDefinitions(), parameters, context );
  }

  QVariantMap AlgorithmBase::guarded( const std::function<QVariantMap()> &work )
  {
    try
    {
      return work();
    }
    catch ( const QgsProcessingException & )
    {
      throw;
    }
    catch ( const QgsException &e )
    {
      throw QgsProcessingException( e.what() );
    }
    catch ( const Cancelled & )
    {
      throw QgsProcessingException( Text::tr( "Cancelled; nothing was written." ) );
    }
    catch ( const std::bad_alloc & )
    {
      throw QgsProcessingException(
        Text::tr( "The machine has not enough memory for this job; run it on parts of the drawing." ) );
    }
    catch ( const std::exception &e )
    {
      // core's own sentences: what could not be read or measured, and what to do.
      throw QgsProcessingException( QString::fromUtf8( e.what() ) );
    }
  }

} // namespace stillhead
