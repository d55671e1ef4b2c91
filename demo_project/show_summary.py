#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Prints what the main job found, and where, wrapped for a terminal. Usage: show_summary.py out/run.json
import json
import os
import sys
import textwrap

from osgeo import gdal, ogr

WIDTH = 100


def labels(path):
    """The labels of the stretches, worst first, with what they are."""
    store = ogr.Open(path)
    rows = [(row["what"], row["beyond"], row["label"], row["length"]) for row in store.GetLayer("stretches")]
    return sorted(rows, key=lambda row: (row[0], -row[1]))


def main(path):
    gdal.UseExceptions()
    folder = os.path.dirname(path)
    with open(path, encoding="utf-8") as file:
        found = json.load(file)["results"]
    for paragraph in found["SUMMARY"].split("\n"):
        print(textwrap.fill(paragraph, WIDTH))
    print("\nStretches to act on, with the worst place of each:")
    for what, _, label, length in labels(os.path.join(folder, "result.gpkg")):
        print(f"  {what:<6} {label:<28} {length:>8,.0f} ft of pipe")
    print("\nWritten:")
    for name in ("result.gpkg", "surface.tif", "map.png"):
        print(f"  {os.path.join(folder, name)}")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("Usage: show_summary.py out/run.json")
    main(sys.argv[1])
