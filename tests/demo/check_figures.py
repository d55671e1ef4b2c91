#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Makes the demo park afresh, answers it by brute force, and holds every answer against figures.csv: the figures that
# the demo promises are true of the park that its scripts make. Usage: check_figures.py
import os
import subprocess
import sys
import tempfile

from osgeo import gdal

import bruteforce

HERE = os.path.dirname(os.path.abspath(__file__))
DEMO = os.path.join(HERE, "..", "..", "demo_project")
EAST = 320000


def read_figures():
    with open(os.path.join(HERE, "figures.csv"), encoding="utf-8") as table:
        rows = [line.rstrip("\n").split(";") for line in table if not line.startswith("#")]
    return {figure: (float(value), float(tolerance), unit) for figure, value, tolerance, unit, _ in rows}


def by_brute_force(park):
    """The same figures from the brute force."""
    found = bruteforce.answers(park)
    lengths, highest, lowest, ends = (found[key] for key in ("lengths", "highest", "lowest", "ends"))
    terrace = next(line for line in park["lines"] if line.name == "Terrace main")
    (over_from, over_to), = found["over_runs"]["Terrace main"]
    (pond_from, pond_to), = found["no_terrain_runs"]["Pond main"]
    (above_from, above_to), = found["above_runs"]["Heron Bank"]
    crossing, = found["crossings"]
    near, = found["near"]
    return {
        "static level high": found["static_level_high"], "static level low": found["static_level_low"],
        "doubt": found["doubt"],
        "Terrace main, pipe at the meter": terrace.pipe[0],
        "Terrace main, at the meter, high": park["p_high"][terrace.first],
        "Wren Gully, pipe": highest["Terrace main"]["pipe"], "Wren Gully, along": highest["Terrace main"]["along"],
        "Wren Gully, high": highest["Terrace main"]["pressure"],
        "Mill Meadow, worst pipe": highest["Meadow main"]["pipe"],
        "Mill Meadow, worst, high": highest["Meadow main"]["pressure"],
        "Pond main end, pipe": ends["Pond main"]["pipe"], "Pond main end, high": ends["Pond main"]["p_high"],
        "Heron Bank, highest pipe": lowest["Heron Bank"]["pipe"],
        "Heron Bank, highest pipe, high": (found["static_level_high"] - lowest["Heron Bank"]["pipe"])
        * bruteforce.PSI_PER_FT,
        "Heron Bank, highest pipe, low": lowest["Heron Bank"]["pressure"],
        "Heron Bank far end, pipe": ends["Heron Bank"]["pipe"], "Heron Bank far end, low": ends["Heron Bank"]["p_low"],
        "Kite Hill 2, highest pipe": lowest["Kite Hill 2"]["pipe"],
        "Kite Hill 2, lowest, low": lowest["Kite Hill 2"]["pressure"],
        "West Lawn 2 end, pipe": ends["West Lawn 2"]["pipe"], "West Lawn 2 end, high": ends["West Lawn 2"]["p_high"],
        "length drawn": found["length"], "length within": lengths["within limits"],
        "length over": lengths["over limit"], "length over, mainlines": found["over"]["mainline"],
        "length over, laterals": found["over"]["lateral"], "length under limit": lengths["under limit"],
        "length above static level": lengths["above static level"], "length past a summit": lengths["past a summit"],
        "length no terrain": lengths["no terrain"], "length no source": lengths["no source"],
        "length close call": found["close_call"],
        "Terrace main, over from": over_from, "Terrace main, over to": over_to,
        "Meadow main, over from": found["over_runs"]["Meadow main"][0][0],
        "Pond main, over from": found["over_runs"]["Pond main"][0][0],
        "Pond main, no terrain from": pond_from, "Pond main, no terrain to": pond_to,
        "Hill main, under from": found["under_runs"]["Hill main"][0][0],
        "Heron Bank, above static level from": above_from, "Heron Bank, above static level to": above_to,
        "near misses": len(found["near"]), "near miss, gap": near["gap_ft"],
        "crossings not joined": len(found["crossings"]), "crossing, u": crossing[2][0] - EAST}


def main():
    gdal.UseExceptions()
    with tempfile.TemporaryDirectory() as folder:
        terrain, planning = (os.path.join(folder, name) for name in ("terrain.tif", "planning.gpkg"))
        subprocess.run([os.path.join(DEMO, "make_terrain.py"), terrain], check=True)
        subprocess.run([os.path.join(DEMO, "make_layers.py"), planning], check=True)
        found = by_brute_force(bruteforce.solve(terrain, planning))
    figures = read_figures()
    assert found.keys() == figures.keys(), f"not the same figures: {found.keys() ^ figures.keys()}"
    # A sample stands for half a step to either side, so whatever is placed by samples may be off by a step.
    slack = {"ft": bruteforce.STEP_M / bruteforce.FOOT_M, "m": bruteforce.STEP_M}
    wrong = 0
    for figure, (value, tolerance, unit) in figures.items():
        placed = any(figure.endswith(word) for word in (" from", " to", "crossing, u"))
        allowed = tolerance + (slack[unit] if placed else 0.0)
        difference = found[figure] - value
        if abs(difference) > allowed:
            wrong += 1
            print(f"{figure}: {found[figure]:.4f} {unit}, promised {value}, off by {difference:.4f}, allowed {allowed:.4f}")
    print(f"{len(figures) - wrong} of {len(figures)} figures hold")
    return 1 if wrong else 0


if __name__ == "__main__":
    sys.exit(main())
