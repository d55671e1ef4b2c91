# SPDX-License-Identifier: GPL-2.0-or-later
# The map sheet of the demo park: an A3 print layout with map, legend in plain words, scale, north, what was read where,
# and the cautions. Its texts come from the run itself, so the sheet never says what the run did not find.
import datetime
import json
import os
import textwrap

from qgis.core import (
    QgsLayoutItemLabel, QgsLayoutItemLegend, QgsLayoutItemMap, QgsLayoutItemPolygon, QgsLayoutItemScaleBar,
    QgsLayoutPoint, QgsLayoutSize, QgsLegendRenderer, QgsLegendStyle, QgsMapLayerLegendUtils,
    QgsMarkerSymbol, QgsPrintLayout, QgsRectangle, QgsFillSymbol, QgsUnitTypes)
from qgis.PyQt.QtCore import QPointF, QRectF, QSizeF, Qt
from qgis.PyQt.QtGui import QColor, QFont, QPolygonF

NAME = "Map sheet"
MM = QgsUnitTypes.LayoutMillimeters
SCALE = 3100
MAP = QRectF(10, 30, 300, 217)
CENTRE = (320482.5, 110345.0)
LEGEND_WIDTH = 50  # characters
REGULATORS = "Regulators proposed"
HIDDEN = ("Mainlines", "Laterals", "Devices", "Pressure surface")  # the results draw the pipe

COLOUR_NOTE = "Colour shows pressure band, not utility. A pressure equal to a band limit belongs to the band above."


def font(size, bold=False):
    result = QFont("DejaVu Sans")
    result.setPointSizeF(size)
    result.setBold(bold)
    return result


def label(layout, name, text, rect, size=8.0, bold=False):
    item = QgsLayoutItemLabel(layout)
    item.setId(name)
    item.setText(text)
    item.setFont(font(size, bold))
    item.setHAlign(Qt.AlignLeft)
    item.attemptMove(QgsLayoutPoint(rect.x(), rect.y(), MM))
    item.attemptResize(QgsLayoutSize(rect.width(), rect.height(), MM))
    layout.addLayoutItem(item)
    return item


def add_map(layout, project):
    item = QgsLayoutItemMap(layout)
    item.setId("map")
    layout.addLayoutItem(item)
    item.attemptMove(QgsLayoutPoint(MAP.x(), MAP.y(), MM))
    item.attemptResize(QgsLayoutSize(MAP.width(), MAP.height(), MM))
    show_layers(layout, project)
    half_width, half_height = (size / 2000.0 * SCALE for size in (MAP.width(), MAP.height()))
    item.setExtent(QgsRectangle(CENTRE[0] - half_width, CENTRE[1] - half_height,
                                CENTRE[0] + half_width, CENTRE[1] + half_height))
    item.setFrameEnabled(True)
    return item


def show_layers(layout, project):
    """Lets the map show all layers of the project but those that the results stand for."""
    item = layout.itemById("map")
    item.setLayers([layer for layer in project.layerTreeRoot().layerOrder() if layer.name() not in HIDDEN])
    item.setKeepLayerSet(True)


def add_scale(layout, linked_map):
    bar = QgsLayoutItemScaleBar(layout)
    bar.setId("scale")
    bar.setStyle("Single Box")
    bar.setLinkedMap(linked_map)
    bar.setUnits(QgsUnitTypes.DistanceFeet)
    bar.setUnitLabel("ft")
    bar.setUnitsPerSegment(200)
    bar.setNumberOfSegments(3)
    bar.setNumberOfSegmentsLeft(0)
    bar.setHeight(2.0)
    bar.setFont(font(7.0))
    layout.addLayoutItem(bar)
    bar.attemptMove(QgsLayoutPoint(MAP.right() - 68, MAP.bottom() - 12, MM))
    label(layout, "written scale", f"1 : {SCALE} at A3", QRectF(MAP.right() - 67, MAP.bottom() - 16, 40, 4), 7.0)


def add_north(layout):
    x, y = MAP.left() + 8, MAP.top() + 5
    arrow = QgsLayoutItemPolygon(QPolygonF([QPointF(x, y + 12), QPointF(x + 4, y), QPointF(x + 8, y + 12),
                                            QPointF(x + 4, y + 9)]), layout)
    arrow.setId("north")
    arrow.setSymbol(QgsFillSymbol.createSimple({"color": "black", "outline_style": "no"}))
    layout.addLayoutItem(arrow)
    label(layout, "north letter", "N", QRectF(x + 2.2, y + 12.5, 6, 5), 9.0, True)


def add(project):
    """Adds the sheet to the project."""
    layout = QgsPrintLayout(project)
    layout.initializeDefaults()
    layout.setName(NAME)
    layout.pageCollection().page(0).setPageSize(QgsLayoutSize(420, 297, MM))
    linked_map = add_map(layout, project)
    add_north(layout)
    add_scale(layout, linked_map)
    label(layout, "title", "Sallowmere Park: static pressure along irrigation pipe", QRectF(10, 8, 400, 10), 20.0, True)
    label(layout, "subtitle", "", QRectF(10, 19, 400, 8), 10.0)
    legend = QgsLayoutItemLegend(layout)
    legend.setId("legend")
    legend.setLinkedMap(linked_map)
    layout.addLayoutItem(legend)
    legend.attemptMove(QgsLayoutPoint(MAP.right() + 3, MAP.top() - 2, MM))
    label(layout, "reading title", "Water", QRectF(10, 250, 95, 5), 9.0, True)
    label(layout, "reading", "", QRectF(10, 255, 95, 38), 7.5)
    label(layout, "summary title", "Answer", QRectF(110, 250, 150, 5), 9.0, True)
    label(layout, "summary", "", QRectF(110, 255, 150, 38), 7.5)
    label(layout, "caution title", "Please note", QRectF(265, 250, 145, 5), 9.0, True)
    label(layout, "caution", "", QRectF(265, 255, 145, 38), 7.5)
    project.layoutManager().addLayout(layout)
    fill(layout, project)


def fill(layout, project, run="run.json"):
    """Brings legend and texts up to the last run, whose own account is the file `run`."""
    fill_legend(layout.itemById("legend"), project)
    path = os.path.join(os.path.dirname(os.path.abspath(__file__)), "out", run)
    with open(path, encoding="utf-8") as file:
        fill_texts(layout, json.load(file))


def static_level(found):
    if "STATIC_LEVEL_HIGH" not in found:
        return []
    return [f"Static level: elevation {found['STATIC_LEVEL_HIGH']:.1f} ft high case, {found['STATIC_LEVEL_LOW']:.1f} ft "
            "low case."]


def fill_texts(layout, run):
    given, found = run["inputs"], run["results"]
    answer, *cautions = found["SUMMARY"].split("\n\n")
    if "REGULATOR_COUNT" in found:
        # The plan has a paragraph of its own.
        answer, cautions = f"{answer}\n{cautions[0]}", cautions[1:]
        layout.itemById("title").setText(
            f"Sallowmere Park: static pressure with {found['REGULATOR_COUNT']} proposed regulators in place")
    layout.itemById("subtitle").setText(
        f"Water at rest: {given['SOURCE_VALUE']} psi in the high case (night, winter), {given['SOURCE_LOW']} psi in the low "
        f"case (summer peak). Limits {given['LEAST']} to {given['MOST']} psi.")
    layout.itemById("reading").setText("\n".join((
        f"Source, the circle with a cross: {given['SOURCE_NOTE']}.",
        f"Gauge {given['GAUGE_HEIGHT']} ft above ground.",
        *static_level(found),
        "Ground: terrain.tif, bare earth as supplied, 1 m cells, heights in feet. Cover 2 ft over mainlines, 1 ft over "
        "laterals.",
        f"Terrain error {given['TERRAIN_RMSE']} ft, reading ± {given['READING_ERROR']} psi.",
        f"Stillhead {run['provider_details']['version']}, {datetime.date.today().isoformat()}. Screening, not a design for "
        "water that runs.")))
    layout.itemById("summary").setText(answer)
    layout.itemById("caution").setText("\n".join(cautions + [COLOUR_NOTE]))


def in_place(symbol):
    """A point symbol without the offset that it has on the map; nothing for others."""
    if not isinstance(symbol, QgsMarkerSymbol):
        return None
    symbol = symbol.clone()
    for part in symbol.symbolLayers():
        part.setOffset(QPointF())
    return symbol


def add_to_legend(legend, layer, title, shown, size=QSizeF()):
    """Adds the nodes of a layer's legend that `shown` names, under a title, wrapped to the width of the strip."""
    node = legend.model().rootGroup().addLayer(layer)
    texts = [each.data(0) for each in layer.legend().createLayerTreeModelLegendNodes(node)]
    items = layer.renderer().legendSymbolItems()
    order = [index for index, text in enumerate(texts) if shown(text)]
    QgsMapLayerLegendUtils.setLegendNodeOrder(node, order)
    for index in order:
        QgsMapLayerLegendUtils.setLegendNodeUserLabel(node, index, textwrap.fill(texts[index], LEGEND_WIDTH))
        QgsMapLayerLegendUtils.setLegendNodeSymbolSize(node, index, size)
        QgsMapLayerLegendUtils.setLegendNodeCustomSymbol(node, index, in_place(items[index].symbol()))
    node.setCustomProperty("legend/title-label", title)
    QgsLegendRenderer.setNodeLegendStyle(node, QgsLegendStyle.Subgroup if title else QgsLegendStyle.Hidden)
    legend.model().refreshLayerLegend(node)


def fill_legend(legend, project):
    legend.setAutoUpdateModel(False)
    legend.model().rootGroup().clear()
    layers = {layer.name(): layer for layer in project.mapLayers().values()}
    spans = layers["Pipe by pressure"]
    texts = [each.data(0) for each in spans.legend().createLayerTreeModelLegendNodes(
        project.layerTreeRoot().findLayer(spans))]
    headings = [texts.index(heading) for heading in ("Pressure at rest, high case", "Pipe", "Look here")]
    caution = next(index for index, text in enumerate(texts) if text.startswith("Pressure at rest. "))
    for begin, end in zip(headings, headings[1:] + [caution]):
        add_to_legend(legend, spans, texts[begin], lambda text, part=texts[begin + 1:end]: text in part)
    if REGULATORS in layers:
        add_to_legend(legend, layers[REGULATORS], "Proposed", lambda text: True)
    add_to_legend(legend, layers["Worst places"], "Worst places", 
                  lambda text: text.endswith("stretch") or text.startswith(("summit", "sag")))
    add_to_legend(legend, layers["Stretches over or short"], "", lambda text: True,
                  QSizeF(11.0, 1.2))  # its outlines stand off what they surround
    add_to_legend(legend, layers["Findings"], "Findings", lambda text: True)
    add_to_legend(legend, layers["Nodes"], "Place", lambda text: text == "source")
    add_to_legend(legend, layers["Pond"], "", lambda text: True)
    add_to_legend(legend, layers["Contours, ft"], "", lambda text: True)
    legend.setStyleFont(QgsLegendStyle.Subgroup, font(9.0, True))
    legend.setStyleFont(QgsLegendStyle.SymbolLabel, font(7.5))
    legend.setSymbolWidth(11.0)
    legend.setSymbolHeight(3.6)
    legend.rstyle(QgsLegendStyle.Symbol).setMargin(QgsLegendStyle.Top, 1.1)
    legend.adjustBoxSize()
