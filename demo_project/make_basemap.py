#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Writes what lies under the pipes on the map, all of it from the terrain: contours in feet, and the pond, which is
# where the terrain has no elevation. Usage: make_basemap.py terrain.tif basemap.gpkg
import os
import sys

from osgeo import gdal, ogr

CONTOUR_INTERVAL_FT = 10.0
# Drawn a tenth of a foot high, so that no contour frays over the terrace, which is level at exactly 400 ft.
CONTOUR_BASE_FT = 0.1


def write_contours(band, store, crs):
    layer = store.CreateLayer("contours", crs, ogr.wkbLineString)
    layer.CreateField(ogr.FieldDefn("elevation", ogr.OFTReal))
    gdal.ContourGenerateEx(band, layer, options=[
        f"LEVEL_INTERVAL={CONTOUR_INTERVAL_FT}", f"LEVEL_BASE={CONTOUR_BASE_FT}", f"NODATA={band.GetNoDataValue()}", "ELEV_FIELD=elevation"])


def write_pond(raster, store, crs):
    """The hull of the cells without elevation: their outline without its steps."""
    holes = gdal.GetDriverByName("MEM").Create("", raster.RasterXSize, raster.RasterYSize, 1, gdal.GDT_Byte)
    holes.SetGeoTransform(raster.GetGeoTransform())
    holes.GetRasterBand(1).WriteArray((raster.GetRasterBand(1).GetMaskBand().ReadAsArray() == 0).astype("uint8"))
    cells = ogr.GetDriverByName("Memory").CreateDataSource("")
    shapes = cells.CreateLayer("shapes", crs, ogr.wkbPolygon)
    gdal.Polygonize(holes.GetRasterBand(1), holes.GetRasterBand(1), shapes, -1)
    layer = store.CreateLayer("pond", crs, ogr.wkbPolygon)
    for shape in shapes:
        pond = ogr.Feature(layer.GetLayerDefn())
        pond.SetGeometry(shape.GetGeometryRef().ConvexHull())
        layer.CreateFeature(pond)


def main(terrain, path):
    gdal.UseExceptions()
    if os.path.exists(path):
        os.remove(path)
    raster = gdal.Open(terrain)
    crs = raster.GetSpatialRef()
    store = ogr.GetDriverByName("GPKG").CreateDataSource(path)
    write_contours(raster.GetRasterBand(1), store, crs)
    write_pond(raster, store, crs)
    store = None


if __name__ == "__main__":
    if len(sys.argv) != 3:
        sys.exit("Usage: make_basemap.py terrain.tif basemap.gpkg")
    main(sys.argv[1], sys.argv[2])
