#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Times the main job against the platform's own toolbox in one run: densify to the cell, drape, explode. Both are whole
# processes of qgis_process; the tool's start-up (listing one algorithm's help) is taken off both. Prints a table of our
# time, theirs, the ratio and our peak memory for growing work, and the plain read of the lines and terrain as the limit.
# Usage: jobs_bench.py BUILD_FOLDER [--scales 0.1,0.3,1] [--lines 11000] [--cells 8000] [--folder FOLDER] [--ours-only]
import argparse
import os
import shutil
import subprocess
import sys
import tempfile
import time

import numpy
from osgeo import gdal, ogr, osr

gdal.UseExceptions()
TILES_MIB = 64  # budget of the terrain's tile cache
EPSG, EAST, NORTH = 32631, 320000.0, 110000.0


def make_terrain(path, cells):
    """Smooth hills with a little roughness, 1 m cells, written in strips of 512 rows."""
    srs = osr.SpatialReference()
    srs.ImportFromEPSG(EPSG)
    options = ["TILED=YES", "COMPRESS=DEFLATE", "PREDICTOR=3", "ZLEVEL=1", "NUM_THREADS=ALL_CPUS", "BIGTIFF=IF_SAFER"]
    dataset = gdal.GetDriverByName("GTiff").Create(path, cells, cells, 1, gdal.GDT_Float32, options)
    dataset.SetGeoTransform([EAST - 0.5, 1, 0, NORTH + cells - 0.5, 0, -1])
    dataset.SetProjection(srs.ExportToWkt())
    band = dataset.GetRasterBand(1)
    band.SetNoDataValue(-9999)
    band.SetUnitType("m")
    random = numpy.random.default_rng(7)
    waves = [(w, a, *random.uniform(0, 2 * numpy.pi, 2)) for w, a in ((3000, 40), (900, 15), (250, 4), (60, 0.8))]
    x = numpy.arange(cells, dtype=numpy.float32)[None, :]
    for row in range(0, cells, 512):
        rows = min(512, cells - row)
        y = numpy.arange(row, row + rows, dtype=numpy.float32)[:, None]
        z = numpy.full((rows, cells), 200, numpy.float32)
        for length, height, turn, phase in waves:
            z += height * numpy.sin((x * numpy.cos(turn) + y * numpy.sin(turn)) * (2 * numpy.pi / length) + phase)
        z += random.normal(0, 0.02, z.shape).astype(numpy.float32)
        band.WriteArray(z, 0, row)


def make_lines(path, count, cells):
    """Rows of mainlines off one trunk; every mainline is 200 m long and has ten laterals of 100 m, bent every 10 m."""
    srs = osr.SpatialReference()
    srs.ImportFromEPSG(EPSG)
    random = numpy.random.default_rng(11)
    source = ogr.GetDriverByName("GPKG").CreateDataSource(path)
    layers = {n: source.CreateLayer(n, srs, ogr.wkbLineString) for n in ("mainlines", "laterals")}
    for layer in layers.values():
        layer.CreateField(ogr.FieldDefn("name", ogr.OFTString))

    def add(layer, name, xs, ys):
        feature = ogr.Feature(layers[layer].GetLayerDefn())
        line = ogr.Geometry(ogr.wkbLineString)
        for px, py in zip(xs, ys):
            line.AddPoint_2D(EAST + px, NORTH + py)
        feature.SetGeometry(line)
        feature["name"] = name
        layers[layer].CreateFeature(feature)
        return line.Length()

    mains = max(1, count // 11)
    blocks = max(1, int((cells - 200) // 245))
    rows = -(-mains // blocks)
    gap = (cells - 400.0) / max(1, rows - 1)
    source.StartTransaction()
    total = 0.0
    for number in range(mains):
        x0, y0 = 100.0 + number % blocks * 200.0, 200.0 + number // blocks * gap
        xs = x0 + numpy.arange(21) * 10.0
        ys = y0 + numpy.concatenate(([0.0], random.normal(0, 0.5, 19), [0.0]))
        total += add("mainlines", f"main {number}", xs, ys)
        for lateral in range(10):
            at = 1 + 2 * (lateral // 2) * 2
            way = 1.0 if lateral % 2 else -1.0
            steps = numpy.arange(11) * 10.0 * way
            total += add("laterals", f"lateral {number}-{lateral}", xs[at] + numpy.concatenate(([0.0], random.normal(0, 0.5, 10))), ys[at] + steps)
    trunk = 200.0 + numpy.arange(rows) * gap
    total += add("mainlines", "trunk", numpy.full(rows + 1, 100.0), numpy.concatenate(([150.0], trunk)))
    source.CommitTransaction()
    return total


class Tool:
    def __init__(self, build, folder):
        self.environment = dict(os.environ, QGIS_PLUGINPATH=os.path.join(build, "headless"), QT_QPA_PLATFORM="offscreen",
                                QGIS_CUSTOM_CONFIG_PATH=os.path.join(folder, "config"), XDG_RUNTIME_DIR=os.path.join(folder, "run"))
        os.makedirs(os.path.join(folder, "run"), mode=0o700, exist_ok=True)
        self.command = shutil.which("qgis_process.bin") or shutil.which("qgis_process")
        self.log = os.path.join(folder, "log.txt")
        marker = os.path.join(folder, "config", "enabled")
        if not os.path.exists(marker):
            self.call("plugins", "enable", "stillhead_headless")
            open(marker, "w").close()

    def call(self, *arguments):
        """Seconds and peak memory (MiB) of one run of the tool."""
        began = time.monotonic()
        with open(self.log, "w") as log:
            process = subprocess.Popen([self.command, *arguments], env=self.environment, stdout=log, stderr=log, stdin=subprocess.DEVNULL)
            _, status, usage = os.wait4(process.pid, 0)
        if status != 0:
            sys.exit(f"{' '.join(arguments)} failed; see {self.log}:\n" + open(self.log).read()[-2000:])
        return time.monotonic() - began, usage.ru_maxrss / 1024.0

    def run(self, algorithm, **parameters):
        return self.call("run", algorithm, *[f"--{key}={value}" for key, value in parameters.items()])


def points_of(geometry):
    parts = geometry.GetGeometryCount()
    return sum(points_of(geometry.GetGeometryRef(part)) for part in range(parts)) if parts else geometry.GetPointCount()


def vertices_in(path):
    """Vertices of all layers of a result."""
    source = ogr.Open(path)
    return sum(points_of(feature.GetGeometryRef()) for layer in source for feature in layer if feature.GetGeometryRef())


def best_of(runs, job):
    """The quickest of several runs: what disturbs a machine only ever adds time."""
    return min((job() for _ in range(runs)), key=lambda figures: figures[0])


def ours(tool, folder, lines, terrain):
    result = os.path.join(folder, "ours.gpkg")
    if os.path.exists(result):
        os.remove(result)
    sinks = {name: f'ogr:dbname="{result}" table="{name.lower()}" (geom)' for name in ("SPANS", "NODES", "STRETCHES", "EXTREMES", "FINDINGS")}
    seconds, memory = tool.run("stillhead:staticpressure", MAINS=f"{lines}|layername=mainlines", LATERALS=f"{lines}|layername=laterals",
                               TERRAIN=terrain, SOURCE=f"{EAST + 100},{NORTH + 150} [EPSG:{EPSG}]", SOURCE_VALUE=500, SOURCE_LOW=450,
                               PRESSURE_UNIT=1, LENGTH_UNIT=1, **sinks)
    return seconds, memory, vertices_in(result)


def theirs(tool, folder, lines, terrain):
    paths = {name: os.path.join(folder, name + ".gpkg") for name in ("merged", "dense", "draped", "parts")}
    for path in paths.values():
        if os.path.exists(path):
            os.remove(path)
    gdal.VectorTranslate(paths["merged"], lines, layers=["mainlines"], layerName="lines")
    gdal.VectorTranslate(paths["merged"], lines, layers=["laterals"], layerName="lines", accessMode="append")
    seconds = []
    seconds.append(tool.run("native:densifygeometriesgivenaninterval", INPUT=paths["merged"], INTERVAL=1, OUTPUT=paths["dense"])[0])
    seconds.append(tool.run("native:setzfromraster", INPUT=paths["dense"], RASTER=terrain, BAND=1, NODATA=0, SCALE=1, OUTPUT=paths["draped"])[0])
    seconds.append(tool.run("native:explodelines", INPUT=paths["draped"], OUTPUT=paths["parts"])[0])
    return seconds


def plain_read(lines, terrain):
    began = time.monotonic()
    source = ogr.Open(lines)
    for layer in source:
        for feature in layer:
            feature.GetGeometryRef()
    read_lines = time.monotonic() - began
    began = time.monotonic()
    raster = gdal.Open(terrain)
    for row in range(0, raster.RasterYSize, 512):
        raster.GetRasterBand(1).ReadAsArray(0, row, raster.RasterXSize, min(512, raster.RasterYSize - row))
    return read_lines, time.monotonic() - began


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("build")
    parser.add_argument("--scales", default="0.1,0.3,1")
    parser.add_argument("--lines", type=int, default=11000)
    parser.add_argument("--cells", type=int, default=8000)
    parser.add_argument("--folder")
    parser.add_argument("--ours-only", action="store_true")
    options = parser.parse_args()
    folder = options.folder or tempfile.mkdtemp(prefix="stillhead-bench-")
    os.makedirs(folder, exist_ok=True)
    tool = Tool(os.path.abspath(options.build), folder)
    start, base_memory = min(tool.call("help", "native:explodelines") for _ in range(3))
    print(f"start-up of the tool: {start:.2f} s, {base_memory:.0f} MiB; taken off every time below\n")
    print("| lines | km | cells | ours s | theirs s | ratio | peak MiB over base | bytes per vertex beside tiles | read lines s | read terrain s |")
    print("| --- | --- | --- | --- | --- | --- | --- | --- | --- | --- |")
    for scale in (float(text) for text in options.scales.split(",")):
        start = min(start, *(tool.call("help", "native:explodelines")[0] for _ in range(2)))
        count, cells = int(options.lines * scale), int(options.cells * scale ** 0.5)
        terrain, lines = os.path.join(folder, f"terrain{cells}.tif"), os.path.join(folder, f"lines{count}.gpkg")
        if not os.path.exists(terrain):
            make_terrain(terrain, cells)
        if os.path.exists(lines):
            os.remove(lines)
        length = make_lines(lines, count, cells)
        read_lines, read_terrain = plain_read(lines, terrain)
        seconds, memory, vertices = best_of(3, lambda: ours(tool, folder, lines, terrain))
        net = seconds - start
        other = float("nan") if options.ours_only else best_of(2, lambda: (sum(theirs(tool, folder, lines, terrain)),))[0] - 3 * start
        over = memory - base_memory
        print(f"| {count} | {length / 1000:.0f} | {cells}² | {net:.2f} | {other:.2f} | {other / net:.1f} | {over:.0f} | "
              f"{max(0, over - TILES_MIB) * 1048576 / vertices:.0f} | {read_lines:.2f} | {read_terrain:.2f} |", flush=True)


if __name__ == "__main__":
    main()
