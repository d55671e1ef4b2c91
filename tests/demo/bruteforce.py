#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Answers the demo park by brute force, for comparison: every pipe is looked at every 2 cm with a sampler of its own,
# joined by nearest samples, and flooded sample by sample. It shares no code and no method with core: nothing is
# solved, only tried. Usage: bruteforce.py terrain.tif planning.gpkg [answers.json]
import json
import math
import sys
from collections import defaultdict

import numpy
from osgeo import gdal, ogr

STEP_M = 0.02
FOOT_M = 0.3048
JOIN_M, REACH_M = 0.1, 10.0
# Density of water at 15 °C, 999.1026 kg/m³ (CIPM 2001), and standard gravity, in psi (6894.757 Pa) per foot.
PSI_PER_FT = 999.1026 * 9.80665 * FOOT_M / 6894.757293
LEAST_PSI, MOST_PSI = 30.0, 80.0
RMSE_FT, READING_ERROR_PSI = 0.3, 1.0
DOUBT_PSI = math.hypot(1.96 * RMSE_FT * PSI_PER_FT * math.sqrt(2.0), READING_ERROR_PSI)


class Ground:
    """Bilinear surface through the cell centres; not a number where a corner that carries weight has no value."""

    def __init__(self, path):
        raster = gdal.Open(path)
        band = raster.GetRasterBand(1)
        assert band.GetUnitType() == "ft"
        self.heights = band.ReadAsArray().astype(float)
        self.heights[self.heights == band.GetNoDataValue()] = numpy.nan
        self.left, self.width, _, self.top, _, self.height = raster.GetGeoTransform()

    def at(self, x, y):
        column = (x - self.left) / self.width - 0.5
        row = (y - self.top) / self.height - 0.5
        c, r = numpy.floor(column).astype(int), numpy.floor(row).astype(int)
        fx, fy = column - c, row - r
        total = numpy.zeros_like(x)
        for dc, wx in ((0, 1.0 - fx), (1, fx)):
            for dr, wy in ((0, 1.0 - fy), (1, fy)):
                corner = self.heights[numpy.clip(r + dr, 0, self.heights.shape[0] - 1),
                                      numpy.clip(c + dc, 0, self.heights.shape[1] - 1)]
                weight = wx * wy
                total += numpy.where(weight > 0.0, corner * weight, 0.0)
        return total


class Line:
    """A drawn line as samples: place, length from its start in metres, pipe elevation in feet."""

    def __init__(self, role, feature, ground):
        self.role, self.name = role, feature.GetField("name")
        vertices = numpy.array(feature.GetGeometryRef().GetPoints())[:, :2]
        x, y, along, done = [], [], [], 0.0
        for a, b in zip(vertices[:-1], vertices[1:]):
            length = math.dist(a, b)
            t = numpy.linspace(0.0, 1.0, max(1, math.ceil(length / STEP_M)) + 1)
            x.append(a[0] + t * (b[0] - a[0]))
            y.append(a[1] + t * (b[1] - a[1]))
            along.append(done + t * length)
            done += length
        self.x, self.y, self.along = (numpy.concatenate(part) for part in (x, y, along))
        self.pipe = ground.at(self.x, self.y) - feature.GetField("cover")
        self.first = 0  # number of the first sample among all samples

    def nearest(self, x, y):
        distances = numpy.hypot(self.x - x, self.y - y)
        index = int(numpy.argmin(distances))
        return index, float(distances[index])


def read_lines(path, ground):
    store = ogr.Open(path)
    lines = [Line(role, feature, ground) for layer, role in (("mainlines", "mainline"), ("laterals", "lateral"))
             for feature in store.GetLayer(layer)]
    for before, line in zip(lines[:-1], lines[1:]):
        line.first = before.first + len(before.x)
    return lines


def read_source(path):
    store = ogr.Open(path)
    feature = store.GetLayer("sources").GetNextFeature()
    point = feature.GetGeometryRef()
    return {"x": point.GetX(), "y": point.GetY(), "value": feature.GetField("value"), "low": feature.GetField("low"),
            "gauge": feature.GetField("gauge_height")}


def links(lines):
    """Pairs of samples that are the same place: neighbours along a line, and ends that lie on another line."""
    joined, near = [], []
    for line in lines:
        for end in (0, len(line.x) - 1):
            for other in lines:
                if other is line:
                    continue
                index, gap = other.nearest(line.x[end], line.y[end])
                if gap <= JOIN_M:
                    joined.append((line.first + end, other.first + index))
                elif gap <= 10.0 * JOIN_M:
                    near.append({"line": line.name, "other": other.name, "gap_ft": gap / FOOT_M,
                                 "at": (other.x[index], other.y[index])})
    return joined, near


def crossings(lines, joined):
    """Places where two lines come within a step of each other without a joint near."""
    owner = numpy.concatenate([numpy.full(len(line.x), number) for number, line in enumerate(lines)])
    joints = defaultdict(list)
    x, y = (numpy.concatenate([getattr(line, axis) for line in lines]) for axis in "xy")
    for a, b in joined:
        joints[frozenset((owner[a], owner[b]))].append((x[a], y[a]))
    found = []
    for number, line in enumerate(lines):
        for other_number in range(number + 1, len(lines)):
            other = lines[other_number]
            if line.x.max() < other.x.min() - 1 or other.x.max() < line.x.min() - 1 \
                    or line.y.max() < other.y.min() - 1 or other.y.max() < line.y.min() - 1:
                continue
            distances = [other.nearest(px, py)[1] for px, py in zip(line.x[::25], line.y[::25])]
            for rough in numpy.flatnonzero(numpy.array(distances) < 0.6):
                for index in range(max(0, rough * 25 - 25), min(len(line.x), rough * 25 + 26)):
                    gap = other.nearest(line.x[index], line.y[index])[1]
                    place = (float(line.x[index]), float(line.y[index]))
                    known = [math.dist(place, p) < 1.0 for p in joints[frozenset((number, other_number))]]
                    known += [math.dist(place, found_place) < 1.0 for _, _, found_place in found]
                    if gap <= STEP_M / 2.0 and not any(known):
                        found.append((line.name, other.name, place))
    return found


def flood(count, edges, start, passable):
    """Samples that can be reached from `start` over passable samples."""
    neighbours = defaultdict(list)
    for a, b in edges:
        neighbours[a].append(b)
        neighbours[b].append(a)
    reached = numpy.zeros(count, dtype=bool)
    reached[start] = True
    waiting = [start]
    while waiting:
        for b in neighbours[waiting.pop()]:
            if passable[b] and not reached[b]:
                reached[b] = True
                waiting.append(b)
    return reached


def states(pipe, connected, wet, low_level, high_level):
    """State of each sample, decided in the order of the rules."""
    p_high, p_low = (high_level - pipe) * PSI_PER_FT, (low_level - pipe) * PSI_PER_FT
    state = numpy.full(len(pipe), "within limits", dtype=object)
    state[p_low < LEAST_PSI] = "under limit"
    state[~wet] = "past a summit"
    state[pipe > low_level] = "above static level"
    state[p_high > MOST_PSI] = "over limit"
    state[(p_high > MOST_PSI) & (p_low < LEAST_PSI)] = "over and under"
    state[numpy.isnan(pipe)] = "no terrain"
    state[~connected] = "no source"
    return state, p_high, p_low


def solve(terrain, planning):
    ground = Ground(terrain)
    lines = read_lines(planning, ground)
    source = read_source(planning)
    pipe = numpy.concatenate([line.pipe for line in lines])
    joined, near = links(lines)
    edges = joined + [(line.first + i, line.first + i + 1) for line in lines for i in range(len(line.x) - 1)]

    source_line = min(lines, key=lambda line: line.nearest(source["x"], source["y"])[1])
    start, distance = source_line.nearest(source["x"], source["y"])
    assert distance <= REACH_M
    start += source_line.first
    gauge = float(ground.at(numpy.array([source["x"]]), numpy.array([source["y"]]))[0]) + source["gauge"]
    high_level, low_level = gauge + source["value"] / PSI_PER_FT, gauge + source["low"] / PSI_PER_FT

    connected = flood(len(pipe), edges, start, numpy.ones(len(pipe), dtype=bool))
    wet = flood(len(pipe), edges, start, ~(pipe > low_level))
    state, p_high, p_low = states(pipe, connected, wet, low_level, high_level)
    return {"lines": lines, "pipe": pipe, "joined": joined, "near": near, "connected": connected, "wet": wet,
            "state": state, "p_high": p_high, "p_low": p_low, "high_level": high_level, "low_level": low_level}


def runs(line, wanted):
    """Places along the line, in feet, between which `wanted` holds."""
    inside = wanted[line.first:line.first + len(line.x)].astype(int)
    change = numpy.diff(numpy.concatenate([[0], inside, [0]]))
    begins, ends = numpy.flatnonzero(change == 1), numpy.flatnonzero(change == -1) - 1
    return [(float(line.along[b] / FOOT_M), float(line.along[e] / FOOT_M)) for b, e in zip(begins, ends)]


def answers(park):
    lines, state, pipe = park["lines"], park["state"], park["pipe"]
    close_call = (abs(park["p_high"] - MOST_PSI) <= DOUBT_PSI) | (abs(park["p_low"] - LEAST_PSI) <= DOUBT_PSI)
    close_call &= ~numpy.isin(state, ["above static level", "past a summit", "no terrain", "no source"])
    length, over, close = defaultdict(float), defaultdict(float), 0.0
    for line in lines:
        span = slice(line.first, line.first + len(line.x))
        step = numpy.diff(line.along) / FOOT_M
        half = numpy.zeros(len(line.x))  # each sample stands for half a step to either side
        half[:-1] += step / 2.0
        half[1:] += step / 2.0
        for name in set(state[span]):
            length[name] += float(half[state[span] == name].sum())
        over[line.role] += float(half[state[span] == "over limit"].sum())
        close += float(half[close_call[span]].sum())

    def worst(name, figure):
        line = next(each for each in lines if each.name == name)
        span = slice(line.first, line.first + len(line.x))
        figures = numpy.where(numpy.isnan(pipe[span]), numpy.nan, park[figure][span])
        index = int(numpy.nanargmax(figures) if figure == "p_high" else numpy.nanargmin(figures))
        return {"pressure": float(figures[index]), "pipe": float(line.pipe[index]), "x": float(line.x[index]),
                "y": float(line.y[index]), "along": float(line.along[index] / FOOT_M)}

    by_name = {line.name: line for line in lines}
    return {
        "static_level_high": park["high_level"], "static_level_low": park["low_level"], "doubt": DOUBT_PSI,
        "length": sum(length.values()), "lengths": dict(length), "over": dict(over), "close_call": close,
        "over_runs": {name: runs(by_name[name], state == "over limit") for name in
                      ("Terrace main", "Meadow main", "Pond main")},
        "under_runs": {"Hill main": runs(by_name["Hill main"], state == "under limit")},
        "above_runs": {"Heron Bank": runs(by_name["Heron Bank"], state == "above static level")},
        "no_terrain_runs": {"Pond main": runs(by_name["Pond main"], state == "no terrain")},
        "highest": {line.name: worst(line.name, "p_high") for line in lines},
        "lowest": {line.name: worst(line.name, "p_low") for line in lines},
        "ends": {line.name: {"pipe": float(line.pipe[-1]), "p_high": float(park["p_high"][line.first + len(line.x) - 1]),
                             "p_low": float(park["p_low"][line.first + len(line.x) - 1]),
                             "state": str(state[line.first + len(line.x) - 1])} for line in lines},
        "near": park["near"], "crossings": crossings(lines, park["joined"])}


if __name__ == "__main__":
    gdal.UseExceptions()
    if len(sys.argv) not in (3, 4):
        sys.exit("Usage: bruteforce.py terrain.tif planning.gpkg [answers.json]")
    text = json.dumps(answers(solve(sys.argv[1], sys.argv[2])), indent=1)
    if len(sys.argv) == 4:
        with open(sys.argv[3], "w", encoding="utf-8") as out:
            out.write(text)
    else:
        print(text)
