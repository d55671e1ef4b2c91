// SPDX-License-Identifier: GPL-2.0-or-later
// The pressures are those of the surface's cells, rounded as they are kept there, so that areas and cells agree.
#include "core/surface/bandareas.h"

#include "core/surface/chainassembler.h"
#include "core/surface/fieldtracer.h"
#include "core/surface/polygonbuilder.h"
#include "core/surface/rowstream.h"

#include <algorithm>
#include <limits>
#include <utility>

namespace stillhead
{

  namespace
  {

    //! Steps of all bands, strung band by band.
    class BandRings : public TraceSink
    {
      public:
        explicit BandRings( std::size_t bands )
          : mChains( bands )
          , mPolygons( bands )
        {
        }

        void onLevel( int level, const TraceVertex &from, const TraceVertex &to ) override
        {
          // The band above has the line on its positive side, the one below walks it the other way.
          mChains[static_cast<std::size_t>( level ) + 1].add( from, to );
          mChains[static_cast<std::size_t>( level )].add( to, from );
        }

        void onBorder( int band, const TraceVertex &from, const TraceVertex &to ) override
        {
          mChains[static_cast<std::size_t>( band )].add( from, to );
        }

        template <typename TakePolygon> void endRow( const TakePolygon &take )
        {
          for ( std::size_t band = 0; band < mChains.size(); ++band )
          {
            std::vector<PixelRing> rings = mChains[band].takeRings();
            if ( !rings.empty() )
              mPolygons[band].addRings( std::move( rings ),
                [&take, band]( const std::vector<PixelRing> &polygon ) { take( static_cast<int>( band ), polygon ); } );
          }
        }

      private:
        std::vector<ChainAssembler> mChains;
        std::vector<PolygonBuilder> mPolygons;
    };

    std::vector<TerrainPoint> toMap( const PixelRing &ring, const RasterGrid &grid )
    {
      std::vector<TerrainPoint> places;
      places.reserve( ring.size() + 1 );
      for ( const TerrainPoint &vertex : ring )
        places.push_back( grid.toMap( vertex ) );
      // Rows usually run against the map's second axis: then a positive turn among pixels is clockwise there.
      const std::array<double, 6> &g = grid.geoTransform();
      if ( g[1] * g[5] - g[2] * g[4] < 0.0 )
        std::reverse( places.begin(), places.end() );
      places.push_back( places.front() );
      return places;
    }

  } // namespace

  void traceBandAreas( const ElevationSource &terrain, const BandAreaRequest &request, Monitor &monitor, double from,
    double to, const TakeBandArea &take )
  {
    const RasterGrid &grid = terrain.grid();
    const std::size_t columns = static_cast<std::size_t>( grid.columns() );
    BandRings rings( request.limits.size() + 1 );
    FieldTracer tracer( grid.columns(), request.limits, rings );
    const auto takePolygon = [&]( int band, const std::vector<PixelRing> &polygon ) {
      std::vector<std::vector<TerrainPoint>> places;
      for ( const PixelRing &ring : polygon )
        places.push_back( toMap( ring, grid ) );
      take( band, places );
    };

    RowStream stream;
    stream.threads = request.threads;
    stream.convert = [&]( int row, double *values ) {
      constexpr double none = std::numeric_limits<double>::quiet_NaN();
      for ( std::size_t i = 0; i < columns; ++i )
        values[i] = static_cast<double>( static_cast<float>( request.water.pressureUnder( values[i] ) ) );
      if ( !request.area )
        return;
      std::vector<unsigned char> inside( columns );
      request.area->markRow( row, 0, grid.columns(), inside.data() );
      for ( std::size_t i = 0; i < columns; ++i )
        values[i] = inside[i] ? values[i] : none;
    };
    stream.take = [&]( int, const double *values ) {
      tracer.addRow( values );
      rings.endRow( takePolygon );
    };
    streamRows( terrain, stream, monitor, from, to );
    tracer.finish();
    rings.endRow( takePolygon );
  }

} // namespace stillhead
