# SPDX-License-Identifier: GPL-2.0-or-later
# Run inside a real QGIS Desktop (see desktop.sh) with the native plugin and the headless package both enabled.
# Checks that there is one provider and one menu, that unloading through the plugin manager takes both away, and
# that each of the two removes the provider only if it added it. Writes its verdict to $STILLHEAD_TEST_OUT.
import os
import sys
import traceback

import qgis.utils
from qgis.core import QgsApplication
from qgis.PyQt.QtCore import Qt, QTimer
from qgis.PyQt.QtWidgets import QAbstractItemView, QApplication, QDockWidget
from qgis.utils import iface

sys.path.insert(0, os.environ["STILLHEAD_TEST_FOLDER"])
from planners_round import Round  # noqa: E402

OUT = os.environ["STILLHEAD_TEST_OUT"]
HEADLESS = "stillhead_headless"


def check(holds, what):
    if not holds:
        raise AssertionError(what)


def provider_count():
    return [p.id() for p in QgsApplication.processingRegistry().providers()].count("stillhead")


def stillhead_menus():
    return [a.menu() for a in iface.pluginMenu().actions() if a.menu() and a.text().replace("&", "") == "Stillhead"]


def algorithm_actions():
    return [a for a in stillhead_menus()[0].actions() if a.objectName().startswith("stillhead:")]


def docks():
    return iface.mainWindow().findChildren(QDockWidget, "StillheadDock")


def screenshot(name):
    QApplication.processEvents()
    QApplication.primaryScreen().grabWindow(0).save(os.path.join(OUT, name))


def in_dialog(open_dialog, is_wanted, act):
    """Calls open_dialog(), which blocks while its dialog shows, and lets act(dialog) work in it meanwhile."""
    failures = []
    seen = []
    timer = QTimer()

    def look():
        shown = [w for w in QApplication.topLevelWidgets() if w.isVisible() and is_wanted(w)]
        if not shown:
            return
        timer.stop()
        dialog = shown[0]
        seen.append(dialog)
        try:
            act(dialog)
        except AssertionError as error:
            failures.append(error)
        dialog.reject()

    timer.timeout.connect(look)
    timer.start(100)
    open_dialog()
    timer.stop()
    if failures:
        raise failures[0]
    check(seen, "the dialog was shown")


def set_native_plugin(state):
    """Ticks or unticks the native plugin in the plugin manager, as a user does."""

    def tick(dialog):
        model = dialog.findChild(QAbstractItemView, "vwPlugins").model()
        rows = [model.index(row, 0) for row in range(model.rowCount())]
        ours = [index for index in rows if index.data() == "Stillhead"]
        check(len(ours) == 1, "the plugin manager lists the native plugin once")
        model.setData(ours[0], state, Qt.CheckStateRole)

    in_dialog(
        iface.pluginManagerInterface().showPluginManager,
        lambda dialog: dialog.objectName() == "QgsPluginManagerBase",
        tick,
    )


def check_both_enabled():
    check(HEADLESS in qgis.utils.active_plugins, "the headless package is enabled too")
    check(provider_count() == 1, "one provider with both enabled")
    provider = QgsApplication.processingRegistry().providerById("stillhead")
    check(provider.name() == "Stillhead", "the provider's name")
    check(not provider.icon().pixmap(24, 24).isNull(), "the provider's icon")


def check_menu():
    menus = stillhead_menus()
    check(len(menus) == 1, "one Stillhead menu")
    actions = algorithm_actions()
    check(
        [a.objectName() for a in actions]
        == ["stillhead:newplan", "stillhead:staticpressure", "stillhead:pressuresurface"],
        "the algorithms in the menu",
    )
    check(all(not a.icon().pixmap(24, 24).isNull() for a in actions), "icons in the menu")
    iface.mainWindow().menuBar().setActiveAction(iface.pluginMenu().menuAction())
    iface.pluginMenu().setActiveAction(menus[0].menuAction())
    menus[0].popup(iface.pluginMenu().mapToGlobal(iface.pluginMenu().actionGeometry(menus[0].menuAction()).topRight()))
    screenshot("menu.png")
    menus[0].close()
    iface.pluginMenu().close()


def check_menu_opens_algorithms():
    for action in algorithm_actions():
        title = action.text().rstrip("…").lower()
        name = action.objectName().split(":")[1]
        in_dialog(
            action.trigger, lambda dialog: dialog.windowTitle().lower() == title, lambda _: screenshot(name + ".png")
        )


def check_without_processing():
    """Where the Processing plugin is off, the menu says so instead of failing."""
    qgis.utils.active_plugins.remove("processing")
    algorithm_actions()[0].trigger()
    qgis.utils.active_plugins.append("processing")
    message = iface.messageBar().currentItem()
    check(message and "Processing plugin is not running" in message.text(), "a message says that Processing is off")
    iface.messageBar().clearWidgets()


def check_headless_first():
    """As QGIS starts: plugins from a search path are loaded after the Python ones."""
    check(qgis.utils.plugins[HEADLESS].added, "the headless package came first")
    set_native_plugin(Qt.Unchecked)
    check(not stillhead_menus(), "unloading removes the menu")
    check(not docks(), "unloading removes the panel")
    check(provider_count() == 1, "the native plugin leaves a provider that it did not add")
    check(qgis.utils.unloadPlugin(HEADLESS), "the headless package unloads")
    check(provider_count() == 0, "the headless package removes what it added")


def check_native_first():
    """As when both are installed in QGIS's own folders."""
    set_native_plugin(Qt.Checked)
    check(provider_count() == 1, "the native plugin adds the provider")
    check(len(stillhead_menus()) == 1, "the menu is back")
    check(qgis.utils.loadPlugin(HEADLESS) and qgis.utils.startPlugin(HEADLESS), "the headless package loads")
    check(provider_count() == 1, "one provider when the headless package comes second")
    check(qgis.utils.unloadPlugin(HEADLESS), "the headless package unloads again")
    check(provider_count() == 1, "the headless package leaves a provider that it did not add")
    set_native_plugin(Qt.Unchecked)
    check(provider_count() == 0, "unloading removes the provider that the native plugin added")
    check(not stillhead_menus(), "unloading removes the menu again")
    set_native_plugin(Qt.Checked)
    check(provider_count() == 1, "the native plugin loads again")


def main():
    verdict = "passed"
    try:
        check_both_enabled()
        check_menu()
        check_menu_opens_algorithms()
        check_without_processing()
        Round(OUT, check, screenshot).run()
        check_headless_first()
        check_native_first()
        screenshot("desktop.png")
    except BaseException:
        verdict = traceback.format_exc()
    with open(os.path.join(OUT, "verdict.txt"), "w", encoding="utf-8") as file:
        file.write(verdict)
    # QGIS closes with the plugin loaded: its exit status says whether that went well.
    QTimer.singleShot(0, iface.actionExit().trigger)


main()
