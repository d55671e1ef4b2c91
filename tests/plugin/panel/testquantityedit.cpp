// SPDX-License-Identifier: GPL-2.0-or-later
// Figures that are typed: units convert what is shown, and what was typed comes back to the digit.
#include "plugin/panel/quantityedit.h"

#include <QLocale>
#include <QSignalSpy>
#include <QTest>

using namespace stillhead;

namespace
{

  DisplayUnits units( PressureUnit pressure, LengthUnit length )
  {
    return DisplayUnits( pressure, length, 15.0 );
  }

  const DisplayUnits PSI_FEET = units( PressureUnit::Psi, LengthUnit::Foot );
  const DisplayUnits KPA_METRES = units( PressureUnit::Kilopascal, LengthUnit::Metre );

} // namespace

class TestQuantityEdit : public QObject
{
    Q_OBJECT

  private slots:
    void cleanup() { QLocale::setDefault( QLocale::c() ); }
    void convertsAndComesBack_data();
    void convertsAndComesBack();
    void readsBothDecimalMarks();
    void keepsWhatIsNoNumber();
    void anotherQuantityBeginsAnew();
    void tellsOnlyOfTyping();
};

void TestQuantityEdit::convertsAndComesBack_data()
{
  QTest::addColumn<bool>( "isPressure" );
  QTest::addColumn<QString>( "typed" );
  QTest::addColumn<QString>( "shown" );
  // 1 psi = 6.894757 kPa (NIST SP 811), 1 ft = 0.3048 m exactly.
  QTest::newRow( "pressure" ) << true << "71.3"
                              << "491.596";
  QTest::newRow( "many digits" ) << true << "30.123456789"
                                 << "207.694";
  QTest::newRow( "length" ) << false << "2.5"
                            << "0.762";
  QTest::newRow( "blank" ) << true << ""
                           << "";
}

void TestQuantityEdit::convertsAndComesBack()
{
  QFETCH( bool, isPressure );
  QFETCH( QString, typed );
  QFETCH( QString, shown );
  QuantityEdit edit( isPressure ? QuantityEdit::Quantity::Pressure : QuantityEdit::Quantity::Length, PSI_FEET );
  QTest::keyClicks( &edit, typed );
  QCOMPARE( edit.parameterText(), typed );
  edit.setUnits( KPA_METRES );
  QCOMPARE( edit.text(), shown );
  edit.setUnits( PSI_FEET );
  QCOMPARE( edit.parameterText(), typed );
}

void TestQuantityEdit::readsBothDecimalMarks()
{
  QLocale::setDefault( QLocale( QLocale::German ) );
  QuantityEdit edit( QuantityEdit::Quantity::Pressure, PSI_FEET );
  QTest::keyClicks( &edit, "71,5" );
  QCOMPARE( edit.parameterText(), QString( "71.5" ) );
  edit.setUnits( KPA_METRES );
  QCOMPARE( edit.text(), QString( "492,975" ) );
  edit.clear();
  QTest::keyClicks( &edit, "71.25" );
  QVERIFY( edit.isReadable() );
}

void TestQuantityEdit::keepsWhatIsNoNumber()
{
  QuantityEdit edit( QuantityEdit::Quantity::Pressure, PSI_FEET );
  QTest::keyClicks( &edit, "65 psi" );
  QVERIFY( !edit.isReadable() );
  edit.setUnits( KPA_METRES );
  // The reader of the parameter says what is wrong with it.
  QCOMPARE( edit.parameterText(), QString( "65 psi" ) );
}

void TestQuantityEdit::anotherQuantityBeginsAnew()
{
  QuantityEdit edit( QuantityEdit::Quantity::Pressure, PSI_FEET );
  QTest::keyClicks( &edit, "65" );
  edit.setQuantity( QuantityEdit::Quantity::Length );
  QVERIFY( edit.text().isEmpty() );
  QVERIFY( edit.parameterText().isEmpty() );
  QCOMPARE( edit.placeholderText(), QString( "ft" ) );
}

void TestQuantityEdit::tellsOnlyOfTyping()
{
  QuantityEdit edit( QuantityEdit::Quantity::Pressure, PSI_FEET );
  QSignalSpy edits( &edit, &QuantityEdit::edited );
  edit.setParameterText( "62" );
  edit.setUnits( KPA_METRES );
  QCOMPARE( edits.count(), 0 );
  QTest::keyClicks( &edit, "1" );
  QCOMPARE( edits.count(), 1 );
}

QTEST_MAIN( TestQuantityEdit )
#include "testquantityedit.moc"
