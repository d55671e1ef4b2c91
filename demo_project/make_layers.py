#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Writes the planning layers of the invented Sallowmere Park: what a planner has drawn (mainlines, laterals) and
# noted (the reading at the meter). Coordinates are metres east and north of the park's own origin. Three faults are
# drawn on purpose: an end that stops short of its main, a line that only crosses, and a leg under a pond.
# With --reclaimed a second system is drawn and noted too: a cistern on the knoll with a line of its own, which crosses the
# terrace main and must not join it.
# Usage: make_layers.py [--reclaimed] planning.gpkg
import os
import sys

from osgeo import gdal, ogr, osr

EPSG = 32631
EAST, NORTH = 320000, 110000
MAIN_COVER_FT, LATERAL_COVER_FT = 2.0, 1.0

MAINS = [
    ("Terrace main", [(40, 380), (160, 380), (450, 380), (580, 380), (690, 380), (880, 380)]),
    ("Meadow main", [(160, 380), (170, 240), (200, 100), (480, 90)]),
    ("Hill main", [(580, 380), (590, 455), (640, 515)]),
    ("Pond main", [(880, 380), (872, 260), (800, 140), (690, 105)]),
]


def pairs(name, columns, main_v, up_v, down_v):
    """Two laterals at each column, one up and one down from the main; numbered west to east, up first."""
    ends = [((u, main_v(u)), (u, end_v(u))) for u in columns for end_v in (up_v, down_v)]
    return [(f"{name} {number}", [start, end]) for number, (start, end) in enumerate(ends, 1)]


def level(v):
    return lambda u: v


def meadow_main(u):
    """The meadow main's last leg, from (200, 100) to (480, 90)."""
    return 100.0 - (u - 200.0) / 28.0


LATERALS = [
    ("West Lawn 1", [(70, 380), (70, 440)]),
    ("West Lawn 2", [(70, 380), (70, 268)]),
    ("West Lawn 3", [(115, 380), (115, 440)]),
    ("West Lawn 4", [(115, 380), (115, 318)]),
    ("Orchard 1", [(160, 380), (158, 470), (152, 560)]),
    ("Orchard 2", [(210, 380.4), (215, 430)]),  # stops 0.4 m short of the main
    *pairs("Shoulder", (410, 450, 490, 530), level(380), level(425), level(318)),
    *pairs("Mill Meadow", (240, 285, 330, 375, 420, 465), meadow_main,
           lambda u: meadow_main(u) + 45.0, lambda u: meadow_main(u) - 55.0),
    ("Kite Hill 1", [(590, 455), (545, 475)]),
    ("Kite Hill 2", [(590, 455), (655, 440)]),
    ("Kite Hill 3", [(640, 515), (600, 560)]),
    ("Heron Bank", [(640, 515), (680, 540), (735, 600), (790, 655)]),
    ("Fountain line", [(583.2, 404), (560, 392), (552, 340)]),  # crosses the terrace main
    *pairs("East Lawn", (740, 785, 830), level(380), level(425), level(325)),
    ("Pond Side 1", [(872, 260), (925, 255)]),
    ("Pond Side 2", [(836, 200), (890, 185)]),
    ("Pond Side 3", [(690, 105), (650, 150)]),
    ("Pond Side 4", [(690, 105), (655, 60)]),
]

SOURCES = [
    ((40, 380), {
        "name": "Lamp Row meter", "kind": "pressure reading", "value": 71.0, "low": 62.0, "gauge_height": 2.5,
        "note": "Gauge on the test cock behind the meter: 71 psi on 13 January 2026, 5 am, 62 psi on 14 July 2026, 7 pm"}),
]

RECLAIMED_MAIN = ("Dipping line", [(150, 590), (138, 470), (135, 300)])
RECLAIMED_SOURCE = ((150, 590), {
    "name": "Orchard cistern", "system": "reclaimed", "kind": "water level", "value": 440.0, "low": 436.0,
    "note": "Overflow and lowest operating level by the drawing of the cistern"})

PIPE_FIELDS = {
    "name": ogr.OFTString, "system": ogr.OFTString, "cover": ogr.OFTReal, "rating": ogr.OFTReal,
    "inside_diameter": ogr.OFTReal}
SOURCE_FIELDS = {
    "name": ogr.OFTString, "system": ogr.OFTString, "kind": ogr.OFTString, "value": ogr.OFTReal, "low": ogr.OFTReal,
    "elevation": ogr.OFTReal, "gauge_height": ogr.OFTReal, "boost": ogr.OFTReal, "boost_low": ogr.OFTReal,
    "note": ogr.OFTString}
DEVICE_FIELDS = {
    "name": ogr.OFTString, "system": ogr.OFTString, "kind": ogr.OFTString, "set": ogr.OFTReal, "rise": ogr.OFTReal,
    "boost": ogr.OFTReal, "boost_low": ogr.OFTReal, "elevation": ogr.OFTReal, "direction": ogr.OFTString}


def geometry(kind, points):
    shape = ogr.Geometry(kind)
    for u, v in points:
        shape.AddPoint_2D(EAST + u, NORTH + v)
    return shape


def write_layer(store, crs, name, kind, fields, rows):
    """Adds a layer; `rows` are pairs of points and attributes."""
    layer = store.CreateLayer(name, crs, kind)
    for field, field_type in fields.items():
        layer.CreateField(ogr.FieldDefn(field, field_type))
    for points, attributes in rows:
        feature = ogr.Feature(layer.GetLayerDefn())
        for field, value in attributes.items():
            feature.SetField(field, value)
        feature.SetGeometry(geometry(kind, points))
        layer.CreateFeature(feature)


def pipes(lines, cover, **more):
    return [(points, {"name": name, "cover": cover, **more}) for name, points in lines]


def main(path, reclaimed):
    mains = pipes(MAINS, MAIN_COVER_FT)
    sources = list(SOURCES)
    if reclaimed:
        mains += pipes([RECLAIMED_MAIN], MAIN_COVER_FT, system="reclaimed")
        sources.append(RECLAIMED_SOURCE)
    gdal.UseExceptions()
    gdal.SetConfigOption("OGR_CURRENT_DATE", "2026-07-14T05:10:00.000Z")  # the same file from every run
    if os.path.exists(path):
        os.remove(path)
    crs = osr.SpatialReference()
    crs.ImportFromEPSG(EPSG)
    store = ogr.GetDriverByName("GPKG").CreateDataSource(path)
    write_layer(store, crs, "mainlines", ogr.wkbLineString, PIPE_FIELDS, mains)
    write_layer(store, crs, "laterals", ogr.wkbLineString, PIPE_FIELDS, pipes(LATERALS, LATERAL_COVER_FT))
    write_layer(store, crs, "sources", ogr.wkbPoint, SOURCE_FIELDS, [([place], row) for place, row in sources])
    write_layer(store, crs, "devices", ogr.wkbPoint, DEVICE_FIELDS, [])
    store = None


if __name__ == "__main__":
    arguments = [argument for argument in sys.argv[1:] if argument != "--reclaimed"]
    if len(arguments) != 1:
        sys.exit("Usage: make_layers.py [--reclaimed] planning.gpkg")
    main(arguments[0], "--reclaimed" in sys.argv)
