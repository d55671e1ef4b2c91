// SPDX-License-Identifier: GPL-2.0-or-later
// Cuts lines where something joins them and makes nodes and spans of it.
#pragma once

#include "core/network/canonicaldrawing.h"
#include "core/network/disjointsets.h"
#include "core/network/network.h"

#include <optional>
#include <vector>

namespace stillhead
{

  //! Places on a line nearer than this are one: no span is shorter.
  constexpr double LEAST_SPAN_M = 0.001;

  //! A place where a line is cut; `element` is its number in the sets of things that meet.
  struct LineCut
  {
      int line = -1;
      double alongM = 0.0;
      int element = -1;
  };

  /**
   * Collects cuts and what meets them. Elements 0 to 2 × lines − 1 are the ends, further ones the cuts.
   */
  class Noding
  {
    public:
      /**
       * \param ends sets of ends that meet
       * \param sameJointM places of one node on a line no farther apart than this cut it once: ends that meet near a line
       * make one joint on it, not one each with a tiny loop between
       */
      Noding( const CanonicalDrawing &drawing, DisjointSets ends, double sameJointM );

      //! Cuts \a line at \a alongM; returns the new element.
      int cut( int line, double alongM );

      //! Elements \a a and \a b meet.
      void join( int a, int b ) { mSets.join( a, b ); }

      //! Sorts the cuts and lets those nearer than LEAST_SPAN_M on a line (its ends included) meet. Call before asking and again after further cuts.
      void settle();

      //! Elements on \a line within \a reachM of \a alongM along it.
      std::vector<LineCut> near( int line, double alongM, double reachM ) const;

      //! True if both elements belong to one node.
      bool together( int a, int b ) { return mSets.find( a ) == mSets.find( b ); }

      //! True for the elements that are ends of a line.
      bool isEnd( int element ) const { return element < mEnds; }

      /**
       * The network.
       * \param nodeOfEnd receives the node of every end
       * \param asked elements whose nodes are asked for, and where they go
       */
      Network network( const std::vector<int> &asked, std::vector<int> &nodeOfEnd, std::vector<int> &nodeOfAsked );

    private:
      LineCut endOf( int line, bool last ) const;
      void choosePlaces( Network &network, const std::vector<int> &nodeOfElement ) const;

      const CanonicalDrawing &mDrawing;
      double mSameJointM;
      int mEnds;
      DisjointSets mSets;
      std::vector<LineCut> mCuts;
  };

} // namespace stillhead
