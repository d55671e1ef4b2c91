#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Times the pressure surface against GDAL's Python raster calculator in one run: whole processes, the start-up of each
# tool (the same job on a tiny terrain) taken off. DEFLATE on both sides. Prints our time, theirs, the ratio, our peak
# memory and, as the limit, a plain copy of the raster into the same compression; runs alternate and the median counts.
# Usage: surface_bench.py BUILD_FOLDER [--cells 6000] [--scales 1,3,10] [--runs 3] [--folder FOLDER] [--ours-only]
import argparse
import os
import statistics
import sys
import tempfile
import time

from osgeo import gdal

from jobs_bench import EAST, EPSG, NORTH, Tool, make_terrain

gdal.UseExceptions()
TINY = 16


def remove(path):
    if os.path.exists(path):
        os.remove(path)


def timed(command, log):
    """Seconds of one process."""
    began = time.monotonic()
    status = os.waitstatus_to_exitcode(os.system(" ".join(f"'{part}'" for part in command) + f" > '{log}' 2>&1"))
    if status != 0:
        sys.exit(f"{command[0]} failed; see {log}")
    return time.monotonic() - began


def ours(tool, folder, terrain, low):
    """Seconds and peak memory of our job."""
    result = os.path.join(folder, "ours.tif")
    remove(result)
    case = {"SOURCE_LOW": 250} if low else {}
    return tool.run("stillhead:pressuresurface", TERRAIN=terrain, SOURCE=f"{EAST + 5},{NORTH + 5} [EPSG:{EPSG}]", SOURCE_KIND=1,
                    SOURCE_VALUE=260, PRESSURE_UNIT=0, LENGTH_UNIT=1, SURFACE=result, **case)


def theirs(folder, terrain):
    result = os.path.join(folder, "theirs.tif")
    remove(result)
    return timed(["gdal_calc.py", "-A", terrain, f"--outfile={result}", "--calc=1.4210580*(260.0-A)", "--type=Float32",
                  "--co=COMPRESS=DEFLATE", "--co=BIGTIFF=YES", "--quiet"], os.path.join(folder, "theirs.log"))


def copy(folder, terrain):
    result = os.path.join(folder, "copy.tif")
    remove(result)
    options = ["TILED=YES", "COMPRESS=DEFLATE", "PREDICTOR=3", "ZLEVEL=1", "NUM_THREADS=ALL_CPUS", "BIGTIFF=IF_SAFER"]
    return timed(["gdal_translate", "-q", *[part for option in options for part in ("-co", option)], terrain, result],
                 os.path.join(folder, "copy.log"))


def check(folder):
    """The two results agree wherever there is ground (theirs computes in 32-bit floats)."""
    a = gdal.Open(os.path.join(folder, "ours.tif")).ReadAsArray(0, 0, 500, 500)
    b = gdal.Open(os.path.join(folder, "theirs.tif")).ReadAsArray(0, 0, 500, 500)
    if abs(a - b).max() > 1e-3:
        sys.exit(f"the results differ by {abs(a - b).max()}")


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("build")
    parser.add_argument("--cells", type=int, default=6000)
    parser.add_argument("--scales", default="1,3,10")
    parser.add_argument("--runs", type=int, default=3)
    parser.add_argument("--folder")
    parser.add_argument("--ours-only", action="store_true")
    options = parser.parse_args()
    folder = options.folder or tempfile.mkdtemp(prefix="stillhead-bench-")
    os.makedirs(folder, exist_ok=True)
    tool = Tool(os.path.abspath(options.build), folder)
    tiny = os.path.join(folder, f"terrain{TINY}.tif")
    make_terrain(tiny, TINY)
    start, base = min(ours(tool, folder, tiny, False) for _ in range(3))
    their_start = min(theirs(folder, tiny) for _ in range(3))
    print(f"start-up taken off: ours {start:.2f} s ({base:.0f} MiB), theirs {their_start:.2f} s\n")
    print("| cells | ours s | two bands s | theirs s | ratio | peak MiB over base | plain copy s |")
    print("| --- | --- | --- | --- | --- | --- | --- |")
    for scale in (float(text) for text in options.scales.split(",")):
        cells = int(options.cells * scale ** 0.5)
        terrain = os.path.join(folder, f"terrain{cells}.tif")
        if not os.path.exists(terrain):
            make_terrain(terrain, cells)
        times = {"ours": [], "both": [], "theirs": [], "copy": []}
        memory = 0.0
        for _ in range(options.runs):
            seconds, used = ours(tool, folder, terrain, True)
            times["both"].append(seconds - start)
            memory = max(memory, used)
            seconds, used = ours(tool, folder, terrain, False)
            times["ours"].append(seconds - start)
            times["copy"].append(copy(folder, terrain))
            times["theirs"].append(float("nan") if options.ours_only else theirs(folder, terrain) - their_start)
        if not options.ours_only:
            check(folder)
        median = {name: statistics.median(values) for name, values in times.items()}
        print(f"| {cells}² | {median['ours']:.2f} | {median['both']:.2f} | {median['theirs']:.2f} | "
              f"{median['ours'] / median['theirs']:.2f} | {memory - base:.0f} | {median['copy']:.2f} |", flush=True)


if __name__ == "__main__":
    main()
