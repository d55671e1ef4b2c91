// SPDX-License-Identifier: GPL-2.0-or-later
// The panel: answer on top, then drawing, ground, water and limits in the order in which a planner thinks, units at the
// foot. What is set here goes into the project and to the preview; nothing waits for a button.
#pragma once

#include "plugin/panel/panelsettings.h"
#include "plugin/preview/preview.h"

#include <qgsdockwidget.h>
#include <qgspointxy.h>

#include <QPointer>
#include <QTimer>

#include <memory>

class QgsMapCanvas;
class QgsMapTool;

namespace stillhead
{

  class AnswerBar;
  class DrawingSection;
  class GroundSection;
  class Inquiry;
  class LimitsSection;
  class Section;
  class SourcePickTool;
  class UnitsBar;
  class WaterSection;

  class Dock : public QgsDockWidget
  {
      Q_OBJECT

    public:
      Dock( QgsMapCanvas *canvas, QgsProject *project, QWidget *parent = nullptr );
      ~Dock() override;

      Preview &preview() { return *mPreview; }

      //! Answers about places of the map.
      Inquiry &inquiry() { return *mInquiry; }

      //! The sentence at the top.
      QString answer() const;

      //! Saves the results into the GeoPackage \a path and shows them as layers.
      void save( const QString &path );

    signals:
      //! Something is to be said to the user; \a isProblem tells how.
      void said( const QString &text, bool isProblem );

    private:
      void askWhereToSave();
      void buildWidgets();
      void connectAll();

      //! Shows what the project keeps, or a first choice.
      void readProject();
      void showSettings( const PanelSettings &settings );
      PanelSettings settings() const;
      PreviewInput input() const;

      //! Something was changed by the user.
      void apply();
      void changeUnits();
      void follow();
      void guessAgain();

      void pick( bool wanted );
      void accept( const QgsPointXY &place );
      QString look( const QgsPointXY &place );
      QgsPointXY toPlan( const QgsPointXY &place ) const;

      QgsMapCanvas *mCanvas;
      QgsProject *mProject;
      Preview *mPreview;
      TerrainKeeper mLookTerrain; //!< of looks before there is a result
      QTimer mSave;               //!< layers leave one by one when a project closes; that is nothing to keep
      AnswerBar *mAnswer = nullptr;
      DrawingSection *mDrawing = nullptr;
      GroundSection *mGround = nullptr;
      WaterSection *mWater = nullptr;
      LimitsSection *mLimits = nullptr;
      QVector<Section *> mSections;
      UnitsBar *mUnits = nullptr;
      Inquiry *mInquiry = nullptr;
      std::unique_ptr<SourcePickTool> mPickTool;
      QPointer<QgsMapTool> mToolBefore;
  };

} // namespace stillhead
