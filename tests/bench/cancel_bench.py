#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# How long a run goes on once it has been cancelled: the main job is run in this process again and again and cancelled
# after ever more of its time. Prints a table; the largest answer counts.
# Usage: cancel_bench.py BUILD_FOLDER LINES.gpkg TERRAIN.tif X,Y [--cancels 20]   (files as jobs_bench.py --folder makes them)
import argparse
import ctypes
import os
import tempfile
import threading
import time

os.environ.setdefault("QT_QPA_PLATFORM", "offscreen")
os.environ["QGIS_CUSTOM_CONFIG_PATH"] = tempfile.mkdtemp()

from qgis.core import QgsApplication, QgsProcessingContext, QgsProcessingException, QgsProcessingFeedback, QgsProject  # noqa: E402


def run(algorithm, parameters, cancel_after):
    """Seconds until the run ended, and seconds from the cancel to its end (None if it ended before)."""
    context, feedback = QgsProcessingContext(), QgsProcessingFeedback(False)
    context.setProject(QgsProject.instance())
    cancelled = []

    def cancel():
        cancelled.append(time.monotonic())
        feedback.cancel()

    timer = threading.Timer(cancel_after, cancel) if cancel_after is not None else None
    began = time.monotonic()
    if timer:
        timer.start()
    try:
        algorithm.run(parameters, context, feedback, {}, False)
    except QgsProcessingException:
        if not cancelled:
            raise
    ended = time.monotonic()
    if timer:
        timer.cancel()
    return ended - began, ended - cancelled[0] if cancelled else None, feedback.progress()


def main():
    parser = argparse.ArgumentParser()
    parser.add_argument("build")
    parser.add_argument("lines")
    parser.add_argument("terrain")
    parser.add_argument("source")
    parser.add_argument("--cancels", type=int, default=20)
    options = parser.parse_args()
    application = QgsApplication([], False)
    application.initQgis()
    library = ctypes.CDLL(os.path.abspath(os.path.join(options.build, "lib", "libstillhead_processing.so")))
    library.stillhead_register_provider()
    algorithm = QgsApplication.processingRegistry().createAlgorithmById("stillhead:staticpressure")
    folder = tempfile.mkdtemp()
    parameters = dict(MAINS=f"{options.lines}|layername=mainlines", LATERALS=f"{options.lines}|layername=laterals",
                      TERRAIN=options.terrain, SOURCE=options.source, SOURCE_VALUE=500, PRESSURE_UNIT=1, LENGTH_UNIT=1)
    for name in ("SPANS", "NODES", "STRETCHES", "EXTREMES", "FINDINGS"):
        parameters[name] = f"ogr:dbname='{folder}/result.gpkg' table=\"{name.lower()}\" (geom)"
    whole, _, _ = run(algorithm, parameters, None)
    os.remove(f"{folder}/result.gpkg")
    print(f"whole run: {whole:.2f} s\n\n| cancelled after s | at progress % | ended after another s |\n| --- | --- | --- |")
    worst = 0.0
    for step in range(options.cancels):
        after = whole * (step + 0.5) / options.cancels
        _, answer, progress = run(algorithm, parameters, after)
        if answer is not None:
            worst = max(worst, answer)
            print(f"| {after:.2f} | {progress:.0f} | {answer:.2f} |", flush=True)
    print(f"\nlargest: {worst:.2f} s")
    application.exitQgis()


if __name__ == "__main__":
    main()
