#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Prints what the main job found, and where, then the regulators proposed with the figures before and after, wrapped for a
# terminal. Usage: show_summary.py out/run.json
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


def regulators(path):
    """One line for each regulator proposed."""
    store = ogr.Open(path)
    for row in store.GetLayer("regulators"):
        yield (f"  {row['name']:<4} set {row['set']:.0f} psi (gauge at no flow {row['lockup']:.0f}), {row['distance_along']:,.0f} ft "
               f"along {row['drawn_layer']} feature {row['drawn_fid']}, pipe {row['z']:.0f} ft; may stand {row['place_from']:,.0f} to "
               f"{row['place_to']:,.0f} ft along; fails open to {row['p_failed_open']:.0f} psi")


def show_proposal(folder, before):
    with open(os.path.join(folder, "proposal.json"), encoding="utf-8") as file:
        after = json.load(file)["results"]
    print("\nRegulators proposed:")
    for line in regulators(os.path.join(folder, "proposal.gpkg")):
        print(textwrap.fill(line, WIDTH, subsequent_indent="       "))
    print(textwrap.fill(after["SUMMARY"].split("\n")[0], WIDTH))
    print("\n                     today   with them")
    for text, name in (("Over, ft", "LENGTH_OVER"), ("Short, ft", "LENGTH_SHORT")):
        print(f"  {text:<14} {before[name]:>10,.0f}  {after[name]:>10,.0f}")


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
    show_proposal(folder, found)
    print("\nWritten:")
    for name in ("result.gpkg", "proposal.gpkg", "surface.tif", "map.png"):
        print(f"  {os.path.join(folder, name)}")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("Usage: show_summary.py out/run.json")
    main(sys.argv[1])
