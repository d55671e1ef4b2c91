#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Prints the demo project's map sheet to a picture, with the styles that the last run stored beside its layers and the
# texts of that run. Usage: render_map.py out/map.png
import os
import sys

from qgis.core import QgsApplication, QgsLayoutExporter, QgsProject

import map_sheet

HERE = os.path.dirname(os.path.abspath(__file__))
DPI = 200


def main(path):
    project = QgsProject.instance()
    assert project.read(os.path.join(HERE, "sallowmere.qgs"))
    broken = [layer.name() for layer in project.mapLayers().values() if not layer.isValid()]
    if broken:
        sys.exit(f"Layers that do not open: {', '.join(broken)}. Run demo_project/run.sh.")
    for name in ("Worst places", "Findings", "Nodes", "Pipe by pressure", "Stretches over or short"):
        project.mapLayersByName(name)[0].loadDefaultStyle()
    layout = project.layoutManager().layoutByName(map_sheet.NAME)
    map_sheet.fill(layout, project)
    settings = QgsLayoutExporter.ImageExportSettings()
    settings.dpi = DPI
    settings.exportMetadata = False
    result = QgsLayoutExporter(layout).exportToImage(path, settings)
    if result != QgsLayoutExporter.Success:
        sys.exit(f"The map could not be written to {path}.")


if __name__ == "__main__":
    if len(sys.argv) != 2:
        sys.exit("Usage: render_map.py out/map.png")
    application = QgsApplication([], False)
    application.initQgis()
    main(sys.argv[1])
    application.exitQgis()
