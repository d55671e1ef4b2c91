#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Writes the bare earth of the invented Sallowmere Park: a terrace, a meadow, a gully, a hill, a knoll and a pond.
# Every height follows from the formulas below, without noise, so that each answer of the demo can be worked by hand.
# The park lies in open sea where grid and ground lengths agree: no real place.
# Usage: make_terrain.py terrain.tif
import sys

import numpy
from osgeo import gdal, osr

EPSG = 32631
EAST, NORTH = 320000, 110000  # map position of the park's own origin u = 0, v = 0
COLUMNS, ROWS = 1001, 701     # one cell a metre, cell centres at whole metres
NODATA = -9999.0


def smooth(t):
    """0 up to t = 0, 1 from t = 1, level at both ends."""
    t = numpy.clip(t, 0.0, 1.0)
    return t * t * (3.0 - 2.0 * t)


def bump(q):
    """1 at q = 0, falling to 0 at q = 1, level at both."""
    return numpy.where(q < 1.0, (1.0 - q) ** 2, 0.0)


def mound(u, v, height, centre, radii):
    return height * bump(((u - centre[0]) / radii[0]) ** 2 + ((v - centre[1]) / radii[1]) ** 2)


def ground(u, v):
    """Ground in feet at u metres east and v metres north of the park's origin; not a number in the pond."""
    terrace = 400.0 + 0.04 * numpy.maximum(0.0, u - 450.0)
    meadow = 332.0 + 0.008 * u
    height = meadow + (terrace - meadow) * smooth((v - 110.0) / 230.0)

    gully_axis = 300.0 + 30.0 * numpy.sin((v - 380.0) / 75.0)
    gully_depth = numpy.where(v >= 380.0, 50.0 * smooth((650.0 - v) / 270.0), 10.0 + 40.0 * smooth((v - 110.0) / 270.0))
    height = height - gully_depth * bump(((u - gully_axis) / 75.0) ** 2)

    height = height + mound(u, v, 146.8, (680.0, 540.0), (270.0, 200.0))  # Kite Hill
    height = height + mound(u, v, 34.0, (150.0, 590.0), (120.0, 90.0))    # Orchard Knoll

    pond = ((u - 805.0) / 52.0) ** 2 + ((v - 150.0) / 34.0) ** 2 < 1.0
    return numpy.where(pond, numpy.nan, height)


def main(path):
    gdal.UseExceptions()
    u, v = numpy.meshgrid(numpy.arange(COLUMNS, dtype=float), numpy.arange(ROWS - 1, -1, -1, dtype=float))
    heights = numpy.round(ground(u, v), 2)

    raster = gdal.GetDriverByName("GTiff").Create(
        path, COLUMNS, ROWS, 1, gdal.GDT_Float32,
        ["TILED=YES", "BLOCKXSIZE=256", "BLOCKYSIZE=256", "COMPRESS=DEFLATE", "PREDICTOR=3"])
    crs = osr.SpatialReference()
    crs.ImportFromEPSG(EPSG)
    raster.SetProjection(crs.ExportToWkt())
    raster.SetGeoTransform((EAST - 0.5, 1.0, 0.0, NORTH + ROWS - 0.5, 0.0, -1.0))
    band = raster.GetRasterBand(1)
    band.SetDescription("ground")
    band.SetUnitType("ft")
    band.SetNoDataValue(NODATA)
    band.WriteArray(numpy.where(numpy.isnan(heights), NODATA, heights).astype(numpy.float32))
    band.ComputeStatistics(False)
    raster.FlushCache()


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("Usage: make_terrain.py terrain.tif")
    main(sys.argv[1])
