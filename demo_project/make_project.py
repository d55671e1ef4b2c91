#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Makes sallowmere.qgs, the demo park as a QGIS project: base map, planning layers, results in their stored styles and
# the map sheet. The project is committed; run this again, after run.sh, only when layers or the sheet change.
# Usage: make_project.py
import os
import re

from qgis.core import (
    QgsApplication, QgsCategorizedSymbolRenderer, QgsCoordinateReferenceSystem, QgsFillSymbol, QgsHillshadeRenderer,
    QgsLineSymbol, QgsMarkerSymbol, QgsPalLayerSettings, QgsProject, QgsRasterLayer, QgsRectangle, QgsReferencedRectangle,
    QgsRendererCategory, QgsRuleBasedRenderer, QgsSingleSymbolRenderer, QgsTextBufferSettings, QgsTextFormat,
    QgsNullSymbolRenderer, QgsVectorLayer, QgsVectorLayerSimpleLabeling, QgsWkbTypes)
from qgis.PyQt.QtGui import QColor, QFont

import map_sheet

HERE = os.path.dirname(os.path.abspath(__file__))
INDEX_CONTOUR = "round( \"elevation\" ) % 50 = 0"
PARK = QgsRectangle(320000, 110000, 321000, 110700)

PIPE_ALIASES = {"name": "Name", "system": "System", "cover": "Depth of cover, ft", "rating": "Pressure rating, psi",
                "inside_diameter": "Inside diameter, in"}
SOURCE_ALIASES = {"name": "Name", "system": "System", "kind": "Kind", "value": "Value, high case",
                  "low": "Value, low case", "elevation": "Surveyed ground elevation, ft",
                  "gauge_height": "Gauge above ground, ft", "boost": "Pump at no flow, psi",
                  "boost_low": "Pump while running, psi", "note": "Who read it, when, where"}
DEVICE_ALIASES = {"name": "Name", "system": "System", "kind": "Kind", "set": "Set, water running, psi",
                  "rise": "Lock-up rise, psi", "boost": "Boost at no flow, psi", "boost_low": "Boost while running, psi",
                  "elevation": "Surveyed ground elevation, ft", "direction": "Direction"}


def vector(file, table, name):
    layer = QgsVectorLayer(f"{os.path.join(HERE, file)}|layername={table}", name, "ogr")
    assert layer.isValid(), f"{file} has no layer {table}: run demo_project/run.sh first"
    return layer


def planning_layer(table, name, symbol, aliases):
    layer = vector("park/planning.gpkg", table, name)
    layer.setRenderer(QgsSingleSymbolRenderer(symbol))
    for field, alias in aliases.items():
        layer.setFieldAlias(layer.fields().indexOf(field), alias)
    return layer


def planning_layers():
    # Thin and grey, for where there are results these draw the pipe.
    pipe = {"line_color": "#808080", "capstyle": "flat", "joinstyle": "round"}
    ring = QgsMarkerSymbol.createSimple({"name": "circle", "color": "white", "size": "5.2", "outline_width": "0.6"})
    cross = QgsMarkerSymbol.createSimple({"name": "cross", "size": "5.2", "outline_width": "0.6"})
    ring.appendSymbolLayer(cross.symbolLayer(0).clone())
    return [
        planning_layer("devices", "Devices", QgsMarkerSymbol.createSimple({"name": "diamond", "color": "white"}),
                       DEVICE_ALIASES),
        planning_layer("sources", "Sources", ring, SOURCE_ALIASES),
        planning_layer("mainlines", "Mainlines", QgsLineSymbol.createSimple({**pipe, "line_width": "0.3"}), PIPE_ALIASES),
        planning_layer("laterals", "Laterals", QgsLineSymbol.createSimple({**pipe, "line_width": "0.15"}), PIPE_ALIASES)]


def result_layers():
    names = {"extremes": "Worst places", "findings": "Findings", "nodes": "Nodes", "spans": "Pipe by pressure",
             "stretches": "Stretches over or short"}
    return [vector("out/result.gpkg", table, name) for table, name in names.items()]


def surface_layer():
    layer = QgsRasterLayer(os.path.join(HERE, "out/surface.tif"), "Pressure surface")
    assert layer.isValid(), "out/surface.tif is missing: run demo_project/run.sh first"
    return layer


def text_format(size, color, halo):
    text = QgsTextFormat()
    font = QFont("DejaVu Sans")
    text.setFont(font)
    text.setSize(size)
    text.setColor(QColor(color))
    buffer = QgsTextBufferSettings()
    buffer.setEnabled(True)
    buffer.setSize(halo)
    buffer.setColor(QColor("white"))
    text.setBuffer(buffer)
    return text


def lowest_on_kite_hill():
    """A label of its own for the lowest lateral that water still reaches: the worst place of its stretch is the top of
    the hill, which says nothing about the heads below."""
    layer = vector("out/result.gpkg", "spans", "Lowest pressure on Kite Hill 2")
    layer.setRenderer(QgsNullSymbolRenderer())
    bold = QFont("DejaVu Sans")
    bold.setBold(True)
    text = text_format(8.0, "black", 0.9)
    text.setFont(bold)
    label = QgsPalLayerSettings()
    label.setFormat(text)
    label.isExpression = True
    label.fieldName = (
        "CASE WHEN \"name\" = 'Kite Hill 2' AND \"p_low\" = minimum( \"p_low\", filter := \"name\" = 'Kite Hill 2' ) "
        "THEN format_number( \"p_low\", 0 ) || ' psi, pipe ' || format_number( \"z_high\", 0 ) || ' ft' END")
    label.geometryGeneratorEnabled = True
    label.geometryGeneratorType = QgsWkbTypes.PointGeometry
    label.geometryGenerator = (
        "with_variable( 'heights', array_foreach( generate_series( 1, num_points( $geometry ) ), "
        "z( point_n( $geometry, @element ) ) ), "
        "point_n( $geometry, array_find( @heights, array_max( @heights ) ) + 1 ) )")
    label.placement = QgsPalLayerSettings.OrderedPositionsAroundPoint
    label.dist = 3.5
    label.displayAll = True
    label.priority = 9
    layer.setLabeling(QgsVectorLayerSimpleLabeling(label))
    layer.setLabelsEnabled(True)
    return layer


def contour_layer():
    layer = vector("park/basemap.gpkg", "contours", "Contours, ft")
    root = QgsRuleBasedRenderer.Rule(None)
    for filter_text, width, name in ((INDEX_CONTOUR, 0.25, "contour every 50 ft"), ("ELSE", 0.1, "contour every 10 ft")):
        line = QgsLineSymbol.createSimple({"line_color": "#a8a8a8", "line_width": str(width)})
        root.appendChild(QgsRuleBasedRenderer.Rule(line, 0, 0, filter_text, name))
    layer.setRenderer(QgsRuleBasedRenderer(root))
    label = QgsPalLayerSettings()
    label.setFormat(text_format(5.5, "#808080", 0.6))
    label.isExpression = True
    label.fieldName = f"CASE WHEN {INDEX_CONTOUR} THEN round( \"elevation\" ) || ' ft' END"
    label.placement = QgsPalLayerSettings.Line
    label.placementFlags = QgsPalLayerSettings.OnLine | QgsPalLayerSettings.MapOrientation
    label.priority = 1
    layer.setLabeling(QgsVectorLayerSimpleLabeling(label))
    layer.setLabelsEnabled(True)
    return layer


def base_layers():
    pond = vector("park/basemap.gpkg", "pond", "Pond")
    hatch = QgsFillSymbol.createSimple({"style": "b_diagonal", "color": "#9a9a9a", "outline_color": "#707070",
                                        "outline_width": "0.3"})
    pond.setRenderer(QgsSingleSymbolRenderer(hatch))
    terrain = QgsRasterLayer(os.path.join(HERE, "park/terrain.tif"), "Terrain, ft")
    shade = QgsHillshadeRenderer(terrain.dataProvider(), 1, 315.0, 45.0)
    shade.setZFactor(0.3048)
    shade.setOpacity(0.2)
    terrain.setRenderer(shade)
    return [contour_layer(), pond, terrain]


def settle_ids(path):
    """Layer ids by name in place of random ones (QGIS ignores ids of ten characters or fewer), and no word of who saved
    it when or in which folder: a new project shows what changed."""
    with open(path, encoding="utf-8") as file:
        text = file.read()
    for layer in QgsProject.instance().mapLayers().values():
        text = text.replace(layer.id(), "sallowmere_" + re.sub(r"\W+", "_", layer.name().lower()))
    text = text.replace(HERE + os.sep, "./")
    text = re.sub(r' save(User|UserFull|DateTime)="[^"]*"', "", text)
    text = re.sub(r"<author>[^<]*</author>", "<author/>", text)
    with open(path, "w", encoding="utf-8") as file:
        file.write(text)


def main():
    project = QgsProject.instance()
    project.setTitle("Sallowmere Park, static pressure")
    project.setCrs(QgsCoordinateReferenceSystem("EPSG:32631"))
    project.setEllipsoid("EPSG:7030")
    results, planning, base = result_layers(), planning_layers(), base_layers()
    spans = next(layer for layer in results if layer.name() == "Pipe by pressure")
    surface = surface_layer()
    groups = (("Results", results[:3] + [lowest_on_kite_hill()] + [spans, results[4], surface]), ("Planning", planning), ("Base map", base))
    for title, layers in groups:
        group = project.layerTreeRoot().addGroup(title)
        for layer in layers:
            project.addMapLayer(layer, False)
            node = group.addLayer(layer)
            node.setExpanded(layer is spans)
            node.setItemVisibilityChecked(layer is not surface)
    project.viewSettings().setDefaultViewExtent(QgsReferencedRectangle(PARK, project.crs()))
    map_sheet.add(project)
    path = os.path.join(HERE, "sallowmere.qgs")
    assert project.write(path)
    settle_ids(path)


if __name__ == "__main__":
    application = QgsApplication([], False)
    application.initQgis()
    main()
    application.exitQgis()
