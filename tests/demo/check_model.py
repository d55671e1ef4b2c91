#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Runs the demo's model of supply options headless and compares its table with the main job's figures and with what must
# follow from a change of the reading. Usage: check_model.py BUILD
import csv
import os
import shutil
import subprocess
import sys
import tempfile

HERE = os.path.dirname(os.path.abspath(__file__))
DEMO = os.path.normpath(os.path.join(HERE, "..", "..", "demo_project"))


def check(holds, what):
    if not holds:
        sys.exit(f"Does not hold: {what}")


def near(row, column, expected, allowed):
    value = float(row[column])
    check(abs(value - expected) <= allowed, f"{row['option']}, {column}: {value}, expected {expected} within {allowed}")


def run(build, folder):
    program = shutil.which("qgis_process.bin") or shutil.which("qgis_process")
    environment = {**os.environ, "QGIS_PLUGINPATH": os.path.join(build, "headless")}
    terrain, planning, table = (os.path.join(folder, name) for name in ("terrain.tif", "planning.gpkg", "options.csv"))
    subprocess.run([os.path.join(DEMO, "make_terrain.py"), terrain], check=True)
    subprocess.run([os.path.join(DEMO, "make_layers.py"), planning], check=True)
    # Enabling an enabled package counts as a failure there.
    subprocess.run([program, "plugins", "enable", "stillhead_headless"], env=environment, check=False)
    pipes = [f"--pressure_{option}:Pipe {option}={folder}/{option}.gpkg" for option in ("today", "lowered", "raised")]
    subprocess.run([program, "run", os.path.join(DEMO, "models", "supply_options.model3"),
                    f"--MAINS={planning}|layername=mainlines", f"--LATERALS={planning}|layername=laterals",
                    f"--TERRAIN={terrain}", "--SOURCE=320040,110380 [EPSG:32631]", f"--table:Options={table}", *pipes],
                   env=environment, check=True)
    for option in ("today", "lowered", "raised"):
        check(os.path.exists(os.path.join(folder, f"{option}.gpkg")), f"the pipes of the option {option} are written")
    with open(table, encoding="utf-8") as file:
        return list(csv.DictReader(file))


def main(build):
    with tempfile.TemporaryDirectory() as folder:
        rows = run(build, folder)
    check([row["option"] for row in rows] == ["as read today", "supply regulated at the meter",
                                              "supply moved to the higher zone"], "three options, in order")
    today, lowered, raised = rows
    near(today, "within", 8041, 1)
    near(today, "over", 4800, 1)
    near(today, "short", 732 + 273 + 382, 1)
    # The highest pressure follows the reading, psi for psi.
    near(today, "p_highest", 105.63, 0.005)
    near(lowered, "p_highest", 105.63 - 11, 0.005)
    near(raised, "p_highest", 105.63 + 14, 0.005)
    for row in rows:
        near(row, "length", 14675, 1)
        near(row, "no_figure", 285 + 164, 1)
    check(float(lowered["over"]) < float(today["over"]) < float(raised["over"]), "more pressure, more pipe over")
    check(float(lowered["short"]) > float(today["short"]) > float(raised["short"]), "more pressure, less pipe short")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("Usage: check_model.py BUILD")
    main(sys.argv[1])
