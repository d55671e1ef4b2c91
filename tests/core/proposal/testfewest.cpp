// SPDX-License-Identifier: GPL-2.0-or-later
// The count against an exhaustive search over small random trees: every choice of pipes that carry a regulator, every
// setting that could matter. The search knows nothing of the programme; it lets water stand and looks at every place.
#include "core/proposal/proposal.h"
#include "tests/core/proposal/smalltree.h"

#include <QTest>

#include <random>

using namespace stillhead;
using namespace smalltree;

namespace
{

  using Random = std::mt19937;

  double pick( Random &random, int low, int high )
  {
    return std::uniform_int_distribution<int>( low, high )( random );
  }

  //! Flat pipes with jumps between them: where on a pipe a regulator stands makes no difference.
  Tree randomTree( Random &random, bool unequalRoles )
  {
    Tree tree;
    tree.rules = rulesOf( 30.0, 80.0, 10.0 );
    if ( unequalRoles )
    {
      tree.rules.limits.lateralLeastPa = 20.0;
      tree.rules.limits.lateralMostPa = 65.0;
    }
    tree.source.highM = pick( random, 90, 125 );
    tree.source.lowM = tree.source.highM - pick( random, 0, 15 );
    const int legs = static_cast<int>( pick( random, 1, 5 ) );
    int pipes = 0;
    for ( int i = 0; i < legs; ++i )
    {
      Leg leg;
      leg.parent = i == 0 ? -1 : static_cast<int>( pick( random, -1, i - 1 ) );
      const int count = static_cast<int>( pick( random, 1, 2 ) );
      for ( int p = 0; p < count && pipes < 7; ++p, ++pipes )
      {
        Pipe pipe;
        pipe.fromM = pipe.toM = pick( random, -30, 90 );
        pipe.role = unequalRoles && pick( random, 0, 2 ) == 0 ? Role::Lateral : Role::Mainline;
        pipe.known = pick( random, 0, 11 ) > 0;
        leg.pipes.push_back( pipe );
      }
      if ( leg.pipes.empty() )
        break;
      tree.legs.push_back( leg );
    }
    return tree;
  }

  class Search
  {
    public:
      Search( const Tree &tree, const std::vector<double> &extraLevels )
        : mTree( tree )
        , mToday( placesOf( tree, 1 ) )
        , mLevels( extraLevels )
      {
        for ( std::size_t i = 0; i < tree.legs.size(); ++i )
        {
          for ( std::size_t p = 0; p < tree.legs[i].pipes.size(); ++p )
          {
            const Pipe &pipe = tree.legs[i].pipes[p];
            const double atM = PART_M * static_cast<double>( p );
            // Where two pipes meet a regulator may stand at the height of either.
            const bool above = p > 0 && tree.legs[i].pipes[p - 1].known;
            const double aboveM = above ? tree.legs[i].pipes[p - 1].fromM : ANY_LEVEL_M;
            if ( pipe.known || above )
              mSlots.push_back( { static_cast<int>( i ), atM, pipe.known ? std::min( pipe.fromM, aboveM ) : aboveM } );
            if ( pipe.known && p + 1 == tree.legs[i].pipes.size() )
              mSlots.push_back( { static_cast<int>( i ), atM + PART_M, pipe.fromM } );
            // Of all levels that suit, the highest is one that some pipe just stands.
            if ( pipe.known )
              mLevels.push_back( pipe.fromM + tree.rules.standM( pipe.role ) );
          }
        }
        std::sort( mLevels.begin(), mLevels.end() );
        mLevels.erase( std::unique( mLevels.begin(), mLevels.end() ), mLevels.end() );
      }

      //! The fewest regulators of a plan without fault; \a most + 1 if more than \a most are needed.
      int fewest( int most, bool keepRules )
      {
        mKeepRules = keepRules;
        for ( int count = 0; count <= most; ++count )
        {
          mCount = count;
          if ( choose( 0, {} ) )
            return count;
        }
        return most + 1;
      }

    private:
      struct Slot
      {
          int leg;
          double atM;
          double elevationM;
      };

      bool choose( std::size_t from, std::vector<std::size_t> chosen )
      {
        if ( static_cast<int>( chosen.size() ) == mCount )
          return set( chosen, 0, Valves( mTree.legs.size() ) );
        for ( std::size_t i = from; i < mSlots.size(); ++i )
        {
          std::vector<std::size_t> more = chosen;
          more.push_back( i );
          if ( choose( i + 1, more ) )
            return true;
        }
        return false;
      }

      bool set( const std::vector<std::size_t> &chosen, std::size_t next, Valves valves )
      {
        if ( next == chosen.size() )
          return ( !mKeepRules || keeps( valves ) ) && faultOf( mTree, valves, mToday, 1, true ).empty();
        const Slot &slot = mSlots[chosen[next]];
        for ( const double levelM : mLevels )
        {
          if ( levelM < slot.elevationM + 0.5 )
            continue;
          Valves more = valves;
          more[static_cast<std::size_t>( slot.leg )].push_back( { slot.atM, levelM, slot.elevationM } );
          if ( set( chosen, next + 1, more ) )
            return true;
        }
        return false;
      }

      bool keeps( const Valves &valves ) const
      {
        std::vector<Water> below( mTree.legs.size() );
        const ProposalRules &rules = mTree.rules;
        for ( std::size_t i = 0; i < mTree.legs.size(); ++i )
        {
          const int parent = mTree.legs[i].parent;
          Water water =
            parent < 0 ? Water { mTree.source.highM, mTree.source.lowM } : below[static_cast<std::size_t>( parent )];
          for ( const Valve &valve : valves[i] )
          {
            const double setM = valve.levelM - valve.elevationM;
            if ( water.lowM - valve.elevationM - setM < rules.dropM() - 1e-9 )
              return false;
            if ( rules.mostRatio > 0.0 && water.highM - valve.elevationM > rules.mostRatio * setM + 1e-9 )
              return false;
            if ( rules.settingStepPa > 0.0
              && ( setM < 0.5 * rules.stepM() || std::abs( std::remainder( setM, rules.stepM() ) ) > 1e-9 ) )
              return false;
            water = behind( valve, water, rules );
          }
          below[i] = water;
        }
        return true;
      }

      const Tree &mTree;
      std::vector<Place> mToday;
      std::vector<double> mLevels;
      std::vector<Slot> mSlots;
      int mCount = 0;
      bool mKeepRules = false;
  };

  QString described( const Tree &tree )
  {
    QString text = QStringLiteral( "source %1/%2" ).arg( tree.source.highM ).arg( tree.source.lowM );
    for ( std::size_t i = 0; i < tree.legs.size(); ++i )
    {
      text += QStringLiteral( "; leg %1 on %2:" ).arg( i ).arg( tree.legs[i].parent );
      for ( const Pipe &pipe : tree.legs[i].pipes )
        text += QStringLiteral( " %1-%2%3%4" )
                  .arg( pipe.fromM )
                  .arg( pipe.toM )
                  .arg( pipe.role == Role::Lateral ? "l" : "" )
                  .arg( pipe.known ? "" : "?" );
    }
    return text;
  }

  constexpr int MOST_SEARCHED = 3;

} // namespace

class TestFewest : public QObject
{
    Q_OBJECT

  private slots:
    void neverFewerNeverMore_data();
    void neverFewerNeverMore();
    void rulesKeptWherePossible();
};

void TestFewest::neverFewerNeverMore_data()
{
  QTest::addColumn<bool>( "unequalRoles" );
  QTest::addColumn<int>( "trees" );
  QTest::newRow( "one limit" ) << false << 2000;
  QTest::newRow( "laterals have their own" ) << true << 2000;
}

void TestFewest::neverFewerNeverMore()
{
  QFETCH( bool, unequalRoles );
  QFETCH( int, trees );
  Random random( 20261 );
  int counts[MOST_SEARCHED + 2] = {};
  for ( int i = 0; i < trees; ++i )
  {
    const Tree tree = randomTree( random, unequalRoles );
    const Proposal proposal = propose( forestOf( tree ), tree.rules );
    const int searched = Search( tree, {} ).fewest( MOST_SEARCHED, false );
    ++counts[searched];
    QVERIFY2( std::min( proposal.bound, MOST_SEARCHED + 1 ) == searched,
      qPrintable(
        QStringLiteral( "%1 instead of %2: %3" ).arg( proposal.bound ).arg( searched ).arg( described( tree ) ) ) );
    QVERIFY2( static_cast<int>( proposal.regulators.size() ) == proposal.bound && proposal.proven,
      qPrintable( QStringLiteral( "%1 planned of %2: %3" )
                    .arg( proposal.regulators.size() )
                    .arg( proposal.bound )
                    .arg( described( tree ) ) ) );
    const std::string fault = faultOf( tree, valvesOf( tree, proposal ), placesOf( tree, 50 ), 50, false );
    QVERIFY2( fault.empty(), qPrintable( QString::fromStdString( fault ) + ": " + described( tree ) ) );
  }
  // The trees must put the question: none, one, two, three and more regulators all occur.
  for ( const int count : counts )
    QVERIFY2( count > trees / 400, qPrintable( QString::number( count ) ) );
}

void TestFewest::rulesKeptWherePossible()
{
  Random random( 7 );
  int stricter = 0;
  int impossible = 0;
  for ( int i = 0; i < 600; ++i )
  {
    Tree tree = randomTree( random, i % 2 == 1 );
    tree.rules.leastDropPa = pick( random, 0, 25 );
    tree.rules.mostRatio = pick( random, 0, 2 ) == 0 ? 0.0 : pick( random, 13, 30 ) / 10.0;
    tree.rules.settingStepPa = pick( random, 0, 1 ) == 0 ? 0.0 : pick( random, 1, 8 );
    std::vector<double> levels;
    for ( double levelM = -20.0; levelM <= 120.0; levelM += tree.rules.settingStepPa > 0.0 ? 2.0 : 6.0 )
      levels.push_back( levelM );
    const int searched = Search( tree, levels ).fewest( 2, true );
    const Proposal proposal = propose( forestOf( tree ), tree.rules );
    const int count = static_cast<int>( proposal.regulators.size() );
    const std::string fault = faultOf( tree, valvesOf( tree, proposal ), placesOf( tree, 50 ), 50, false );
    QVERIFY2( fault.empty(), qPrintable( QString::fromStdString( fault ) + ": " + described( tree ) ) );
    QVERIFY2( count >= proposal.bound, qPrintable( described( tree ) ) );
    if ( searched <= 2 )
      QVERIFY2( proposal.rulesKept && count <= searched,
        qPrintable( QStringLiteral( "%1 (kept %2), search finds %3; drop %4 ratio %5 step %6; %7" )
                      .arg( count )
                      .arg( proposal.rulesKept )
                      .arg( searched )
                      .arg( tree.rules.leastDropPa )
                      .arg( tree.rules.mostRatio )
                      .arg( tree.rules.settingStepPa )
                      .arg( described( tree ) ) ) );
    stricter += count > proposal.bound && proposal.rulesKept ? 1 : 0;
    impossible += proposal.rulesKept ? 0 : 1;
  }
  QVERIFY2( stricter > 20, qPrintable( QString::number( stricter ) ) );
  QVERIFY2( impossible > 20, qPrintable( QString::number( impossible ) ) );
}

QTEST_GUILESS_MAIN( TestFewest )
#include "testfewest.moc"
