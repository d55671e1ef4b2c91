#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Runs demo_project/run.sh as a user does and looks at all that it leaves: the layers with their stored styles, the
# surface, the colours of the map, the project that opens them, and the summary on the terminal. Usage: check_run.py BUILD
import json
import os
import subprocess
import sys

from osgeo import gdal, ogr

HERE = os.path.dirname(os.path.abspath(__file__))
DEMO = os.path.normpath(os.path.join(HERE, "..", "..", "demo_project"))
OUT = os.path.join(DEMO, "out")
LAYERS = {"spans": 100, "nodes": 60, "stretches": 5, "extremes": 7, "findings": 6}  # rows, at least
BANDS = ("e8cf7e", "b5b36a", "7d9c7e", "4b7f8c", "2c5c85", "17305e")


def check(holds, what):
    if not holds:
        sys.exit(f"Does not hold: {what}")


def check_layers():
    store = ogr.Open(os.path.join(OUT, "result.gpkg"))
    for name, rows in LAYERS.items():
        layer = store.GetLayer(name)
        check(layer is not None and layer.GetFeatureCount() >= rows, f"result.gpkg has {name} with {rows} rows or more")
    styles = [(row["f_table_name"], row["useAsDefault"]) for row in store.GetLayer("layer_styles")]
    check(sorted(styles) == sorted((name, 1) for name in LAYERS), f"every layer has one style, its default: {styles}")


def check_proposal():
    store = ogr.Open(os.path.join(OUT, "proposal.gpkg"))
    rows = [(row["drawn_layer"], row["drawn_fid"], row["set"], row["why"]) for row in store.GetLayer("regulators")]
    check(sorted(row[:2] for row in rows) == [("mainlines", 2), ("mainlines", 4)], f"two regulators on their mains: {rows}")
    check(all(row[2] == round(row[2]) and row[3] for row in rows), "settings in whole psi, each with its reason")
    over = sum(row["length"] for row in store.GetLayer("spans") if row["over"])
    check(abs(over - 322.0) < 1.0, f"322 ft stay over ({over})")


def check_surface():
    surface = gdal.Open(os.path.join(OUT, "surface.tif"))
    check((surface.RasterXSize, surface.RasterYSize, surface.RasterCount) == (1001, 701, 2), "surface on the terrain's grid")
    check(surface.GetRasterBand(1).GetUnitType() == "psi", "the surface says its unit")


def colours_on_map(name):
    """Points of each band's colour on a sheet's map, its legend left out."""
    picture = gdal.Open(os.path.join(OUT, name))
    check((picture.RasterXSize, picture.RasterYSize) == (3307, 2338), f"{name} is an A3 sheet at 200 dots an inch")
    red, green, blue = picture.ReadAsArray()[:3].astype(int)
    frame = (slice(236, 1944), slice(79, 2440))
    found = []
    for band in BANDS:
        wanted = [int(band[i:i + 2], 16) for i in (0, 2, 4)]
        found.append(((red == wanted[0]) & (green == wanted[1]) & (blue == wanted[2]))[frame].sum())
    return found


def check_map():
    for band, found in list(zip(BANDS, colours_on_map("map.png")))[1:]:
        check(found > 200, f"the map shows band colour {band} ({found} points)")


def check_proposal_map():
    """With the regulators nothing is in the highest band, and hardly anything in the one below."""
    before, after = colours_on_map("map.png"), colours_on_map("proposal.png")
    check(after[-1] == 0, f"no pipe of 100 psi and over is left on the map ({after[-1]} points)")
    check(0 < after[-2] < 0.3 * before[-2], f"pipe of 80 to 100 psi is left in the gully ({after[-2]} of {before[-2]})")


def check_project():
    """The committed project opens all that the run made."""
    script = ("from qgis.core import QgsApplication, QgsProject\n"
              "application = QgsApplication([], False)\napplication.initQgis()\nproject = QgsProject.instance()\n"
              f"assert project.read('{DEMO}/sallowmere.qgs')\n"
              "broken = [layer.name() for layer in project.mapLayers().values() if not layer.isValid()]\n"
              "assert not broken and len(project.mapLayers()) >= 13, broken\n"
              "assert project.layoutManager().layoutByName('Map sheet')\n")
    subprocess.run(["/usr/bin/python3", "-c", script], check=True)


def main(build):
    gdal.UseExceptions()
    result = subprocess.run([os.path.join(DEMO, "run.sh")], env={**os.environ, "STILLHEAD_BUILD": build},
                            stdout=subprocess.PIPE, text=True, check=False)
    print(result.stdout)
    check(result.returncode == 0, "run.sh ends well")
    said = " ".join(result.stdout.split())
    for words in ("Of 14,675 ft of pipe, 8,041 ft stands within 30 to 80 psi", "4,800 ft is over", "Pressure at rest.",
                  "106 psi, pipe 323 ft", "95 psi, pipe 348 ft", "No plan can have fewer.", "out/map.png"):
        check(words in said, f"the summary says “{words}”")
    with open(os.path.join(OUT, "run.json"), encoding="utf-8") as file:
        check(json.load(file)["results"]["STRETCH_COUNT"] == 5, "run.json has the results")
    check_layers()
    check_proposal()
    check_surface()
    check_map()
    check_proposal_map()
    check_project()


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("Usage: check_run.py BUILD")
    main(sys.argv[1])
