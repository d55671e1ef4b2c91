# SPDX-License-Identifier: GPL-2.0-or-later
# Brings the native Processing provider to qgis_process, which loads Python packages only. The shared library
# adds the provider unless it is there already (the desktop plugin may have come first); only if this package
# added it does this package take it away.
import ctypes
import pathlib

from qgis.core import QgsApplication

from ._library import LIBRARY


class HeadlessPlugin:
    def __init__(self):
        self.added = False
        self.library = None

    def initProcessing(self):
        path = (pathlib.Path(__file__).resolve().parent / LIBRARY).resolve()
        self.library = ctypes.CDLL(str(path))
        register = self.library.stillhead_register_provider
        register.argtypes = []
        register.restype = ctypes.c_bool
        self.added = register() or self.added

    def initGui(self):
        self.initProcessing()

    def unload(self):
        if self.added:
            QgsApplication.processingRegistry().removeProvider("stillhead")
            self.added = False


def classFactory(iface):
    return HeadlessPlugin()
