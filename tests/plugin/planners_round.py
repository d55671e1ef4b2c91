# SPDX-License-Identifier: GPL-2.0-or-later
# A planner's round in a real QGIS, called by desktop.py: new plan, terrain, panel, source picked on the map, a line drawn
# with the mouse and coloured before it is finished, a place asked, the lists, and the project opened again. Every step
# leaves a screenshot.
import os
import struct
import time

import processing
from osgeo import gdal, osr
from qgis.core import (
    QgsEditFormConfig, QgsFeature, QgsGeometry, QgsPointXY, QgsProject, QgsRasterLayer, QgsRectangle)
from qgis.PyQt.QtCore import QPoint, Qt
from qgis.PyQt.QtTest import QTest
from qgis.PyQt.QtWidgets import QDockWidget, QLabel, QLineEdit, QPushButton, QTableView, QTabWidget, QToolButton
from qgis.utils import iface

EAST, NORTH, SIZE = 320000.0, 110000.0, 400


class Round:
    def __init__(self, out, check, screenshot):
        self.out, self.check, self.screenshot = out, check, screenshot
        self.canvas = iface.mapCanvas()

    def widget(self, kind, name):
        found = iface.mainWindow().findChildren(kind, name)
        self.check(len(found) == 1, f"one {name}, found {len(found)}")
        return found[0]

    def menu_action(self, name):
        actions = [a for menu in iface.pluginMenu().actions() if menu.menu() for a in menu.menu().actions()]
        return next(a for a in actions if a.objectName() == name)

    def answer(self):
        return self.widget(QLabel, "StillheadAnswer").text()

    def wait_for(self, holds, what, seconds=20):
        until = time.monotonic() + seconds
        while not holds():
            self.check(time.monotonic() < until, f"{what}; the panel says: {self.answer()}")
            QTest.qWait(20)

    def wait_for_answer(self, part):
        state = self.widget(QLabel, "StillheadState")
        self.wait_for(lambda: part in self.answer() and "Computing" not in state.text(), f"waited for “{part}”")

    def settle(self):
        self.canvas.waitWhileRendering()
        QTest.qWait(300)
        self.canvas.waitWhileRendering()

    def pixel(self, east, north):
        point = self.canvas.getCoordinateTransform().transform(QgsPointXY(EAST + east, NORTH + north))
        return QPoint(round(point.x()), round(point.y()))

    def move(self, east, north):
        QTest.mouseMove(self.canvas.viewport(), self.pixel(east, north) + QPoint(3, 3))
        QTest.qWait(30)
        QTest.mouseMove(self.canvas.viewport(), self.pixel(east, north))
        QTest.qWait(60)

    def click(self, east, north, button=Qt.LeftButton):
        self.move(east, north)
        QTest.mouseClick(self.canvas.viewport(), button, Qt.NoModifier, self.pixel(east, north))
        QTest.qWait(60)

    def type(self, name, text):
        edit = self.widget(QLineEdit, name)
        edit.clear()
        QTest.keyClicks(edit, text)

    def make_terrain(self):
        """Ground in metres that falls to the east, with a gully in the south-east."""
        path = os.path.join(self.out, "ground.tif")
        raster = gdal.GetDriverByName("GTiff").Create(path, SIZE, SIZE, 1, gdal.GDT_Float32)
        raster.SetGeoTransform([EAST, 1, 0, NORTH + SIZE, 0, -1])
        system = osr.SpatialReference()
        system.ImportFromEPSG(32631)
        raster.SetProjection(system.ExportToWkt())
        values = []
        for row in range(SIZE):
            for column in range(SIZE):
                gully = max(0.0, 1.0 - abs(column - 300) / 60.0) * max(0.0, (row - 150) / 250.0)
                values.append(150.0 - 0.04 * column - 30.0 * gully)
        raster.GetRasterBand(1).WriteRaster(0, 0, SIZE, SIZE, struct.pack(f"{SIZE * SIZE}f", *values))
        raster = None
        return path

    def begin(self):
        QgsProject.instance().clear()
        self.menu_action("StillheadPanel").trigger()
        self.check(self.widget(QDockWidget, "StillheadDock").isVisible(), "the panel opens from the menu")
        self.wait_for(lambda: "mainlines are drawn in" in self.answer(), "a blank project asks for the drawing")
        self.screenshot("round_0_empty.png")

    def plan(self):
        path = os.path.join(self.out, "plan.gpkg")
        processing.runAndLoadResults("stillhead:newplan", {"CRS": "EPSG:32631", "PLAN": path})
        ground = QgsRasterLayer(self.make_terrain(), "Terrain")
        QgsProject.instance().addMapLayer(ground, False)
        QgsProject.instance().layerTreeRoot().addLayer(ground)
        names = sorted(layer.name() for layer in QgsProject.instance().mapLayers().values())
        self.check(names == ["Devices", "Laterals", "Mainlines", "Sources", "Terrain"], f"the plan is there: {names}")
        self.check(QgsProject.instance().snappingConfig().enabled(), "snapping is on")
        self.mains = QgsProject.instance().mapLayersByName("Mainlines")[0]
        self.laterals = QgsProject.instance().mapLayersByName("Laterals")[0]
        self.wait_for(lambda: "Draw the first mainline" in self.answer(), "the new plan is taken up")
        self.check(self.mains.startEditing(), "mainlines can be edited")
        feature = QgsFeature(self.mains.fields())
        points = [QgsPointXY(EAST + x, NORTH + y) for x, y in ((40, 300), (200, 280), (370, 300))]
        feature.setGeometry(QgsGeometry.fromPolylineXY(points))
        self.check(self.mains.addFeature(feature), "a mainline")
        self.canvas.setDestinationCrs(self.mains.crs())
        self.canvas.setExtent(QgsRectangle(EAST, NORTH, EAST + SIZE, NORTH + SIZE))
        self.settle()
        self.wait_for(lambda: "Pick where the water comes from" in self.answer(), "the source is asked for next")
        self.screenshot("round_1_plan.png")

    def source(self):
        QTest.mouseClick(self.widget(QPushButton, "SOURCE"), Qt.LeftButton)
        self.type("SOURCE_VALUE", "62")
        self.type("SOURCE_LOW", "55")
        self.move(40, 300)
        shown = [w.text() for w in self.canvas.findChildren(QLabel, "StillheadReadOut") if w.isVisible()]
        self.check(len(shown) == 1 and "Ground" in shown[0] and "stand" in shown[0], f"the source is looked at: {shown}")
        self.screenshot("round_2_picking.png")
        self.click(40, 300)
        self.wait_for_answer("within limits at rest")
        self.settle()
        self.screenshot("round_3_answer.png")

    def draw(self):
        config = self.laterals.editFormConfig()
        config.setSuppress(QgsEditFormConfig.SuppressOn)
        self.laterals.setEditFormConfig(config)
        iface.setActiveLayer(self.laterals)
        self.check(self.laterals.startEditing(), "laterals can be edited")
        iface.actionAddFeature().trigger()
        before = self.answer()
        self.click(300, 291)
        self.move(300, 150)
        self.move(300, 20)
        self.wait_for(lambda: self.answer() != before and " over (worst" in self.answer(), "the line under way counts")
        self.screenshot("round_4_drawing.png")
        self.check(self.laterals.featureCount() == 0, "nothing was added by looking")
        self.click(300, 20)
        self.click(300, 20, Qt.RightButton)
        self.wait_for(lambda: self.laterals.featureCount() == 1, "the lateral is drawn")
        self.wait_for_answer(" over (worst")
        self.laterals.undoStack().undo()
        self.wait_for(lambda: " over (worst" not in self.answer(), "undo takes the lateral out of the answer")
        self.laterals.undoStack().redo()
        self.wait_for_answer(" over (worst")

    def ask(self):
        iface.actionPan().trigger()
        self.move(300, 100)
        self.screenshot("round_5_on_pipe.png")
        self.move(120, 120)
        self.screenshot("round_6_off_pipe.png")

    def lists(self):
        self.menu_action("StillheadResults").trigger()
        QTest.qWait(200)
        dock = self.widget(QDockWidget, "StillheadResultsDock")
        tabs = dock.findChild(QTabWidget)
        tabs.setCurrentIndex(1)
        view = tabs.currentWidget().findChild(QTableView)
        self.check(view.model().rowCount() == 1, "one stretch is listed")
        before = self.canvas.extent()
        self.settle()
        QTest.mouseClick(view.viewport(), Qt.LeftButton, Qt.NoModifier, view.visualRect(view.model().index(0, 1)).center())
        self.check(self.canvas.extent() != before, "a click goes to the stretch")
        self.settle()
        self.screenshot("round_7_lists.png")

    def profile(self):
        dock = self.widget(QDockWidget, "StillheadResultsDock")
        tabs = dock.findChild(QTabWidget)
        tabs.setCurrentIndex(3)
        self.canvas.setExtent(QgsRectangle(EAST, NORTH, EAST + SIZE, NORTH + SIZE))
        self.settle()
        tabs.currentWidget().findChildren(QToolButton)[0].click()
        self.click(300, 40)
        words = [w.text() for w in tabs.currentWidget().findChildren(QLabel)]
        self.check(any("from the source" in text for text in words), f"the profile runs to the place: {words}")
        iface.actionPan().trigger()
        self.settle()
        self.screenshot("round_8_profile.png")

    def save(self):
        path = os.path.join(self.out, "saved.gpkg")
        QgsProject.instance().writeEntry("Stillhead", "/saved", path)
        self.widget(QToolButton, "StillheadSave").click()
        group = lambda: QgsProject.instance().layerTreeRoot().findGroup("Pressure at rest")  # noqa: E731
        self.wait_for(lambda: group() is not None and len(group().children()) == 5, "the results come as a group")
        spans = [n.layer() for n in group().children() if n.layer().source().endswith("spans")]
        self.check(spans and spans[0].renderer().type() == "RuleRenderer", "in their own styles")
        self.settle()
        self.screenshot("round_9_saved.png")

    def reopen(self):
        self.check(self.mains.commitChanges() and self.laterals.commitChanges(), "edits are saved")
        answer = self.answer()
        path = os.path.join(self.out, "round.qgz")
        self.check(QgsProject.instance().write(path), "the project is saved")
        iface.newProject(False)
        self.wait_for(lambda: "mainlines are drawn in" in self.answer(), "a new project begins anew")
        self.check(iface.addProject(path), "the project opens again")
        self.wait_for(lambda: self.answer() == answer, "the same answer after opening the project again")
        self.check(not QgsProject.instance().isDirty(), "opening a project changes nothing in it")
        self.settle()
        self.screenshot("round_10_reopened.png")

    def run(self):
        for step in (self.begin, self.plan, self.source, self.draw, self.ask, self.lists, self.profile, self.save, self.reopen):
            step()
