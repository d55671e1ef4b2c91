#!/usr/bin/python3
# SPDX-License-Identifier: GPL-2.0-or-later
# Prints the demo project's map sheet to a picture, with the styles that the last run stored beside its layers and the
# texts of that run; or, with --proposal, the same sheet with the proposed regulators in place.
# Usage: render_map.py out/map.png [--proposal]
import os
import sys

from qgis.core import QgsApplication, QgsLayoutExporter, QgsProject, QgsVectorLayer

import map_sheet

HERE = os.path.dirname(os.path.abspath(__file__))
DPI = 200


RESULTS = {"Worst places": "extremes", "Findings": "findings", "Nodes": "nodes", "Pipe by pressure": "spans",
           "Stretches over or short": "stretches"}


def show_proposal(project):
    """Results of the proposal take the place of those of today; its regulators lie on top. Nodes stay."""
    file = os.path.join(HERE, "out", "proposal.gpkg")
    for name, table in RESULTS.items():
        if name != "Nodes":
            layer = project.mapLayersByName(name)[0]
            layer.setDataSource(f"{file}|layername={table}", name, "ogr")
    for layer in project.mapLayersByName("Lowest pressure on Kite Hill 2"):
        layer.setDataSource(f"{file}|layername=spans", layer.name(), "ogr", False)
    regulators = QgsVectorLayer(f"{file}|layername=regulators", map_sheet.REGULATORS, "ogr")
    project.addMapLayer(regulators, False)
    project.layerTreeRoot().insertLayer(0, regulators)


def main(path, proposal):
    project = QgsProject.instance()
    assert project.read(os.path.join(HERE, "sallowmere.qgs"))
    broken = [layer.name() for layer in project.mapLayers().values() if not layer.isValid()]
    if broken:
        sys.exit(f"Layers that do not open: {', '.join(broken)}. Run demo_project/run.sh.")
    layout = project.layoutManager().layoutByName(map_sheet.NAME)
    if proposal:
        show_proposal(project)
        map_sheet.show_layers(layout, project)
    for name in RESULTS:
        project.mapLayersByName(name)[0].loadDefaultStyle()
    map_sheet.fill(layout, project, "proposal.json" if proposal else "run.json")
    settings = QgsLayoutExporter.ImageExportSettings()
    settings.dpi = DPI
    settings.exportMetadata = False
    result = QgsLayoutExporter(layout).exportToImage(path, settings)
    if result != QgsLayoutExporter.Success:
        sys.exit(f"The map could not be written to {path}.")


if __name__ == "__main__":
    if len(sys.argv) not in (2, 3) or sys.argv[2:] not in ([], ["--proposal"]):
        sys.exit("Usage: render_map.py out/map.png [--proposal]")
    application = QgsApplication([], False)
    application.initQgis()
    main(sys.argv[1], len(sys.argv) == 3)
    application.exitQgis()
