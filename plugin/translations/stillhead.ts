<?xml version="1.0" encoding="utf-8"?>
<!DOCTYPE TS>
<TS version="2.1">
<context>
    <name>Stillhead</name>
    <message>
        <source>Cancelled; nothing was written.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The machine has not enough memory for this job; run it on parts of the drawing.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>m of water</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ft of water</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 %2 per %3 of height, water at %4 °C</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1, %2, ground %3</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>New plan</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>A GeoPackage to draw irrigation pipe in: mainlines, laterals, sources and devices, with forms.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Makes a new GeoPackage with four empty layers to draw in: mainlines, laterals, sources and devices. Each comes with its fields, a form that asks for them with their units, advice where a value cannot be right, and symbols.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Inputs: the CRS to draw in, best a projected one made for the place, and the units in which the fields are filled in.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Outputs: PLAN, the GeoPackage; MAINLINES, LATERALS, SOURCES and DEVICES, its layers, ready to be inputs of the other algorithms. Where the layers are added to the project, snapping to ends and lines is turned on, since pipe joins only where ends meet a line.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Units: the chosen ones stand in the names that the form shows and in the layers&apos; metadata; choose the same where pressure is computed. Inside diameters are in inches with feet, in millimetres with metres.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Limits: a file that is there already is never written over.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>irrigation,plan,draw,layers,geopackage,mainline,lateral,source,device,form,template</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>CRS to draw in</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Of all four layers. Default: the project&apos;s.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Add the layers to the project and turn snapping on</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Only where the run has a project that shows layers. Default: yes.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Planning GeoPackage</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>GeoPackage (*.gpkg)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>CRS is “%1”, which is not known; choose the CRS to draw in.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Made %1 in %2.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The CRS counts in degrees: lengths come out right, but drawing to measure is easier in a projected one.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>PLAN is “%1”; a plan is kept in a GeoPackage: give a name that ends in .gpkg.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>PLAN “%1” is there already and is left as it is; give another name.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The folder “%1” of PLAN does not exist; make it first, or choose another.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Planning layer. Pressures are in %1; elevations, lengths, depths and heights in %2. Choose the same units where pressure is computed from it.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>PLAN “%1” could not be made; check the folder and its free space. %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Kind</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Not below zero; leave it blank where it is not known.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Name</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>System (lines of different systems never join)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure added at no flow</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure added while running</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Not above what is added at no flow, which has to be given too.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Depth of cover, ground down to the top of the pipe</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure rating</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Inside diameter</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>pressure read on a gauge</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>water level as elevation</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>water level above ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 for a reading, %2 for a level</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>High value (night, winter, tank full)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The highest that the source gives at rest.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Low value (summer peak, tank low)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Not above the high value.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Surveyed ground elevation</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Gauge</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Height of the gauge above ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pump at the source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Note</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Who read it, when and where</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Device</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>regulator (pressure-reducing valve)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>booster</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>check valve</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>closed valve</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>control valve</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Regulator</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Set, water running</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>A regulator needs its outlet pressure while water runs.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lock-up rise</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Booster</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Survey</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Surveyed elevation</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>One way</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Direction of flow</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>away from the source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>as the pipe is drawn, start to end</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>against the drawn pipe, end to start</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Devices</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Sources</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Mainlines</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Laterals</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure surface</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Raster of the pressure that water at rest would put on a pipe anywhere on the terrain.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>irrigation,static,pressure,surface,raster,terrain,elevation,water,psi,kPa,head,slope</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Areas of the pressure bands</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lines of ground too high and too low</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Elevation of the static level, high case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Elevation of the static level, low case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground above which the lowest acceptable pressure is not met, low case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground below which the highest acceptable pressure is passed, high case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>AREA (“%1”) cannot be opened as a layer of polygons; check the file and its path.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground at the source: %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static level: elevation %1 in the high case, %2 in the low case (%3).</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>static pressure surface</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Feature %1 of AREA (“%2”) cannot be reprojected to the terrain&apos;s CRS, %3; check the layer&apos;s CRS.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>AREA (“%1”) has no polygons; draw the area first, or leave it out.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>AREA (“%1”) lies nowhere on the terrain; choose an area that the terrain covers.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>a point is the decimal mark, as in 2.5</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>BANDS: “%1” has a decimal comma, but %2; write the limits like 2.5; 3.5.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>BANDS: entry %1 is empty; write rising numbers with one separator between two of them.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>BANDS: entry %1, “%2”, is not a number; write rising numbers separated by comma, semicolon or space.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>BANDS: entry %1, “%2”, is not above the entry before it, “%3”; write the limits in rising order (%4).</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The cover of feature %1 of %2 is “%3” by %4, which is not a number; give a number in %5.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>its field</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 of %2 drawn features have a depth of cover of their own (field `cover`); the others take COVER.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 drawn features have a negative depth of cover: their pipe is taken to lie above ground.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 drawn features have a depth of cover of more than %2; check the unit.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Feature %1 of %2 cannot be reprojected from %3 to %4; check the layers&apos; CRSs.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>A drawn field bears a name that the result needs and is kept under another: %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is reprojected from %2 to %3.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 has no lines; draw the mainlines first, or choose another layer.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 curved lines are followed by chords to within 1 cm on the ground.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 (“%2”) has no coordinate reference system; set the layer&apos;s CRS first.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 (unset, so %2)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is above %2; give limits that leave room between them.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is “%2”, which is not a number. Give the number alone, with a point as decimal mark; its unit is chosen by PRESSURE_UNIT and LENGTH_UNIT.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is “%2”; choose one of %3.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 names a CRS that is not known, “%2”; write the point as x,y [EPSG:code].</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is “%2”, which is no point; write it as x,y [EPSG:code], or pick it on the map.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 cannot be reprojected from %2 to %3; check its coordinates and CRS.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>TERRAIN has no pixels of its own (a map picture?); choose a raster whose cells hold ground elevations.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The terrain could not be read from its provider; check the connection and run again.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>SOURCE_VALUE is not given; give the pressure read at rest, in %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>SOURCE_VALUE is not given; give the water level, in %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>SOURCE_LOW (%1) is above SOURCE_VALUE (%2); the low case must not exceed the high one: swap them.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>BOOST_LOW is given without BOOST; give what the pump adds at no flow as well.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>BOOST_LOW (%1) is above BOOST (%2); a pump adds most at no flow: swap them.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>GAUGE_HEIGHT counts only for a pressure read on a gauge and is left out.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>SOURCE is not given; choose the point where the pressure comes from.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source> (low case %1)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>a pressure of %1 read %2 above ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>a water level at %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>a water level of %1 above ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source> and a pump that adds %1 at no flow, %2 running</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source> and a pump that adds %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>TERRAIN is not given; choose a raster of ground elevations.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>TERRAIN (“%1”) cannot be opened as a raster; check the file and its path.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>TERRAIN_BAND is %1, but the terrain&apos;s bands are numbered 1 to %2; choose the one that holds elevations.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>TERRAIN (“%1”) is a picture in colours, not elevations; choose a raster whose cells hold ground elevations.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>TERRAIN (“%1”) cannot be read; save it as a GeoTIFF and use that.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>unit %1 (chosen by TERRAIN_UNIT)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>unit %1 (the band says so)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>unit %1 (the vertical part of its CRS says so)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>unit %1 (assumed: neither band nor CRS says)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The terrain does not say in which unit its elevations are; metres are assumed. Choose the unit by TERRAIN_UNIT if that is wrong.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The terrain calls its unit “%1”, which is not known here; metres are assumed. Choose the unit by TERRAIN_UNIT if that is wrong.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The terrain holds whole numbers from 0 to 255 only; make sure that it is not a hillshade or another picture.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>terrain “%1”, band %2: %3 × %4 cells of %5 × %6 %7, %8, %9</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Using %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>WATER_TEMPERATURE is %1 °C, out of range; give 0 to 40 °C.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is %2, out of range; give a pressure from 0 to %3, or choose another unit by PRESSURE_UNIT.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is %2 %3, below 0; give a distance of 0 or more.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Depth of cover (ground surface down to the top of the pipe)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe that is always under pressure, drawn as lines. The results are in the CRS of this layer. Fields named `system` and `cover`, where there are any, are read from it.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe below control valves, drawn as lines, in any CRS. Its figure is what it would hold with that valve open and nothing running: the most its heads can see. Optional.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Terrain (bare earth)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Raster of ground elevations without trees and roofs, in any CRS. Elevation is taken from the bilinear surface through the pixel centres; where a pixel that carries weight has no data there is no elevation.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Band of the terrain</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Band that holds the elevations. Default: 1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Unit of the terrain&apos;s elevations</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>As the raster says</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Metre</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Foot (international)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>US survey foot</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Default: as the unit of the band or the vertical part of the raster&apos;s CRS says; if neither says, metres are assumed and the log says so. Choose a unit here where the raster is wrong or silent.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Where the pressure comes from: meter, tank or pump. Joins the nearest pipe within the source&apos;s reach. Needed.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Where the pressure comes from: meter, tank or pump. Needed.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>How far the source may lie from the pipe</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground distance in the length unit. Unset: 10 m. A source farther away than that stops the run.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>What is known at the source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure read on a gauge</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water level as elevation</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water level above ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>What the source&apos;s value is: a pressure read at rest on a gauge, or the open water level of a tank or pond, as an elevation or above ground. Default: a pressure.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Source value, high case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The highest that the source gives at rest: night, winter, tank full. In the pressure unit for a gauge reading, in the length unit for a water level. Needed.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Source value, low case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The lowest that the source gives at rest: summer peak, tank low. Same unit as the high case and not above it. Unset: as the high case.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Surveyed ground elevation at the source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the length unit. Unset: the terrain at the source.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the length unit; negative below ground. Only for a pressure read on a gauge. Default: 0.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pump at the source: pressure added at no flow</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the pressure unit; counts in the high case. Unset: no pump.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pump at the source: pressure added while running</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the pressure unit; counts in the low case. Unset: as at no flow.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Note on the reading</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Who read it, when and where. Kept with the results. Optional.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the length unit; pressure is taken at this depth. Default: 0, at the ground surface.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Depth of cover</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the length unit; pressure is taken at this depth. A drawn feature&apos;s own `cover` field goes before it where it is set. Default: 0, at the ground surface.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lines carry surveyed pipe elevations</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Take the drawn Z as the elevation of the pipe, in place of terrain and cover, straight between vertices. A line without usable Z falls back to the terrain, with a finding. Default: no.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Unit of the drawn Z</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>As the terrain</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Only where lines carry surveyed elevations. Default: as the terrain.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Join tolerance</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground distance in the length unit within which an end joins another end or a line. Unset: 0.1 m.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Join lines that merely cross</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Treat every crossing of two lines as a joint. Default: no; each crossing without a joint is a finding.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lowest acceptable static pressure</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>What the heads need plus what running water takes on the way. In the pressure unit. Unset: 30 psi, 200 kPa, 2 bar, 20 m or 70 ft of water.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Highest acceptable static pressure</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>What pipe, fittings and heads may stand at rest. In the pressure unit. Unset: 80 psi, 550 kPa, 5.5 bar, 55 m or 185 ft of water.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Limits between pressure bands</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Rising limits in the pressure unit, separated by comma, semicolon or space; a point is the decimal mark. Unset: 30, 45, 60, 80, 100 psi; 200, 300, 400, 550, 700 kPa; 2, 3, 4, 5.5, 7 bar; 20, 30, 40, 55, 70 m or 70, 105, 140, 185, 230 ft of water. Unset with a limit given above: the lowest acceptable pressure, two thirds between, the highest, and 1.25 times the highest.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lowest acceptable static pressure of laterals</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>In the pressure unit. Unset: as for all pipe.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Highest acceptable static pressure of laterals</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Error of the terrain (root mean square)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Vertical error of the terrain in the length unit. Default: 0.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Error of the reading (±, at 95 %)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Of the gauge or water level, in the pressure unit. Default: 0.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Depth of summits and sags</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Fall or rise of a mainline in the length unit that makes a high or low place worth an air valve, a drain or a blow-out point: it must fall (rise) by that much on two sides before it goes higher (lower) or ends. Unset: 2 ft or 0.5 m; 0: a millimetre.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Area to stay within</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Polygons in any CRS; cells whose centre lies outside get no pressure. Optional: unset, the whole terrain.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure unit</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>metres of water</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>feet of water</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Unit of every pressure given and returned. Default: psi.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length unit</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>feet</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>metres</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Unit of every elevation, length, depth and height given and returned (international feet). Only the Z of result geometries is in the terrain&apos;s unit. Default: feet.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water temperature (°C)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>0 to 40 °C; decides the weight of water (0.43314 psi per foot at 15 °C). Default: 15.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure along pipes</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure of water at rest on every metre of drawn irrigation pipe, from terrain and one source.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>irrigation,static,pressure,pipe,mainline,lateral,terrain,elevation,water,psi,kPa,head,slope</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe by static pressure</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Nodes</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Stretches over or short</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Worst places</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Findings</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Summary</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Number of spans</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Number of nodes</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Number of stretches</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Number of findings</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lowest pressure, low case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Highest pressure, high case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length of all pipe</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length within limits</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length over</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length short</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length joined to no source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length without terrain</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length too close to call</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is not given; choose a layer of lines.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 (“%2”) cannot be opened as a layer of lines; check the file and its path.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 drawn features in %2; lengths and tolerances are measured on the ground.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe lies at an elevation of %1, which no ground has: the terrain may use a value for “no data” without declaring it, or another unit than it says.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The source joins the pipe %1 away.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground at the source: %1 surveyed, which is used; %2 by the terrain; difference %3.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground at the source: %1 surveyed; the terrain has none there.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground at the source: %1 by the terrain.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The water level lies below the ground at the source; make sure that it is an elevation, not a depth.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Findings: %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>static pressure along pipes</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>highest pressure of a stretch</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>lowest pressure of a stretch</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>highest pressure of a pressure zone</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>lowest pressure of a pressure zone</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>summit of a mainline: place for an air valve</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>sag of a mainline: place for a drain or blow-out</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Span</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Role</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Drawn feature</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lowest pipe elevation, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Highest pipe elevation, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lowest pressure at rest, low case, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Highest pressure at rest, high case, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Band</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure band</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>State</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Over limit in the high case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Short in the low case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure zone</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Doubt, ± %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Too close to call</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Node</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipes that meet</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe elevation, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure at rest, low case, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure at rest, high case, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Stretch</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Over or short</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Worst pressure at rest, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Past the limit by, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe elevation there, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length of pipe, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Label</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>What stands out</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure at rest, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Drawn layer</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Distance from the start of the drawn feature, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Finding</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Message</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Gap, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure from, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure to, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Area, square %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ceiling or floor</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground elevation, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure limit, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ceiling: higher ground has less than %1 %2 (low case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>floor: lower ground has more than %1 %2 (high case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>joint</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>end of a pipe</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>any pressure</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>under %1 %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 %2 and over</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 to %2 %3</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure at rest, high case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1, laterals %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Look here</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>over limit: more than %1 (high case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>over limit in the high case and under it in the low case</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>under limit: less than %1 (low case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>above static level: no water at rest (low case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>past a summit: no water at rest (low case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no terrain: no figure</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no source: joined to none</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>mainline</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>lateral (valve open, nothing running)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>too close to call: the limit lies within the doubt</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>stretch over %1 %2 (high case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>stretch short of %1 %2 (low case)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>above static level: water at rest does not stand here</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure, high case (%1)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure, low case (%1)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure at rest. With water running it is lower: meter, backflow assembly, valves and pipe commonly take 15 to 25 psi and more. Within limits at rest does not mean enough to run.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Planning figures, not a stamped design: measure pressures on site, and follow local plumbing codes, backflow rules and a licensed professional. A regulator can fail open, so pipe and fittings downstream must stand the unregulated pressure or be relieved.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 feature %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>without a system</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>of system “%1”</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>An end of %1 stops %2 short of %3 and is not joined to it. If water passes there, move the end onto the line.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>An end lies where %1 and %2 cross, and joins both.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 and %2 cross without a joint. If water passes there, end a line at the crossing, or set JOIN_CROSSINGS.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 of pipe is joined to no source.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 of pipe lies where the terrain has no elevation; its pressure is not known.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The pipe rises %1 above the static level of the low case here; %2 of pipe beyond lies past a summit and is not served.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Every way to %1 of pipe leads through pipe without elevation, so a summit on the way cannot be ruled out.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 (%2) meets %3 (%4); lines of different systems are not joined.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is drawn on top of %2, vertex by vertex; both are computed.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 has no geometry or no length, and is left out.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 has no surveyed Z (missing, or zero throughout); the terrain is used for it.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Only one value is given for the source, so the low case is the high one. A low value (SOURCE_LOW) shows what is served in the summer peak.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The source&apos;s pressure of %1 lies outside %2 to %3; check its unit.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The pump&apos;s pressure while running (BOOST_LOW) is not given; its no-flow pressure is taken for the low case too, which shows more than it gives.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Units: every pressure is in the chosen pressure unit and every elevation, length, depth and height in the chosen length unit, whatever the map units are. Only the Z of result geometries is in the terrain&apos;s own unit, so that they drape.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Finds the pressure that water at rest puts on every metre of drawn pipe, where that is too much or too little, and which pipe water at rest does not reach.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Inputs: mainlines and laterals drawn as lines, a bare-earth terrain raster, and one source: a gauge reading or a water level, with its highest value (night, winter, tank full) and its lowest (summer peak, tank low). Between two drawn vertices the pipe follows the ground at its depth of cover; lowest and highest places are solved, not sampled. Lines join where ends meet, or where an end meets a line, within the join tolerance.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Outputs: SPANS, the pipe cut exactly where a pressure limit, the static level or the edge of the terrain is met, with pressures, band and state; NODES, where pipes end or meet; STRETCHES, connected pipe that is over or short; EXTREMES, the worst place of each stretch and zone, then the summits and sags of the mainlines, places for air valves, drains and blow-out points; FINDINGS, what to look at in the drawing; SURFACE, the same static level as a raster (off by default); SUMMARY, the figures in plain sentences; and numbers for use in models.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>A summit is a place from which no way along mainlines leads to higher pipe without falling by the depth of summits and sags first, and from which the pipe falls by that depth on two sides at least; a sag is the same upside down. Mainlines count as joined pipe, wherever drawn features begin and end, and every mainline leg at a joint counts; laterals do not. A dead end is neither, and pipe without terrain ends the way. Of a level top one place stands. The pressure of a summit is that of the low case, the pressure of a sag that of the high case.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Limits: one source, no regulators or other devices; the terrain is taken as given (say how far it may be off and places too close to call are marked); where it has no data there are no figures. Features keep their own fields; a drawn key `fid` is not copied, `drawn_fid` names the drawn feature.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Finds the pressure that water at rest would put on a pipe anywhere on the terrain if it were joined to the source without any device between.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Inputs: a bare-earth terrain raster and one source: a gauge reading or a water level, with its highest value and, if known, its lowest; a depth of cover; optionally an area to stay within.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Outputs: SURFACE, a raster on the terrain&apos;s own grid (band 1: high case; band 2: low case, only where a low value is given); BAND_AREAS, polygons of the pressure bands of the high case; GROUND_LIMITS, lines on the ground of the ceiling and the floor, higher ground on their left; STATIC_LEVEL_HIGH and STATIC_LEVEL_LOW; GROUND_TOO_HIGH, the ceiling: the ground elevation above which the lowest acceptable pressure is not met (low case); GROUND_TOO_LOW, the floor: the one below which the highest is passed (high case).</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Limits: no pipe is looked at, so neither summits on the way nor the way itself; negative values lie above the static level.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>None of the drawn lines has any length, so there is no pipe to compute; draw the mainlines first.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The source lies %1 from the nearest pipe, farther than SOURCE_REACH (%2); move it onto the pipe, or raise SOURCE_REACH.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The terrain has no elevation at the source; give SOURCE_ELEVATION, or a terrain that reaches there.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>No drawn line lies on the terrain; check that lines and terrain cover the same ground and carry the right CRS.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 to %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 (laterals %2)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 stands within %2 at rest</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is over (%2 of it mainlines)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is short</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is joined to no source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 lies where the terrain has no elevation</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 is too close to call</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Of %1 of pipe, %2.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The highest pressure is %1 at pipe elevation %2 (high case), the lowest %3 at %4 (low case).</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The static level is at elevation %1 in the high case and %2 in the low case, from %3; %4.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 would replace the input %2 (“%3”); choose another file or layer name for the result.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 cannot be written: the file %2 is read-only; choose another file.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 cannot be written: no file can be made in the folder %2; choose another folder.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 and %2 would both be written to %3, one over the other; give each a file or a layer name of its own.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>pipe %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1, %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1, pipe %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Made by the run that wrote the layer</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Style and metadata could not be stored in %1%2; the figures are there.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 could not be written to %2%3; check that the place has room and that nobody else holds it open.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 has places without figures (no source or no terrain), which the format of %2 cannot hold; choose a GeoPackage (.gpkg).</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 could not be completed%2; check that the place has room and that nobody else holds it open.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Made by Stillhead %1, %2, on %3</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Source: %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Note on the source: %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground: %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Weight of water: %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>No temporary file can be made; check the folder for temporary files and run again.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The place for temporary files is full; make room there and run again.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::Answer</name>
    <message>
        <source>%1 within limits at rest</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 over (worst %2)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 short (worst %2)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 joined to no source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 without terrain</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water stands at elevation %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water stands at elevation %1 (summer peak) to %2 (night, winter).</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::AnswerBar</name>
    <message>
        <source>Copy the summary with its figures and cautions</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Copy the summary</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the results as layers of the project</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the results</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Computing…</source>
        <translation type="unfinished"></translation>
    </message>
    <message numerus="yes">
        <source>%n findings</source>
        <translation type="unfinished">
            <numerusform></numerusform>
        </translation>
    </message>
</context>
<context>
    <name>stillhead::Dock</name>
    <message>
        <source>Stillhead</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the results</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>GeoPackage (*.gpkg)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Results saved in “%1”.</source>
        <translation type="unfinished"></translation>
    </message>
    <message numerus="yes">
        <source>%n features</source>
        <translation type="unfinished">
            <numerusform></numerusform>
        </translation>
    </message>
    <message>
        <source>Click to set the source here.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>This place cannot be told in the CRS of the mainlines; check the CRSs of map and layer.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::DrawingSection</name>
    <message>
        <source>Drawing</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lines carry surveyed &amp;Z</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Mainlines</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Laterals</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Depth of co&amp;ver</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Lines carry surveyed Z</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::GroundSection</name>
    <message>
        <source>Ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Terrain</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Heights in</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1, heights in %2</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::LimitsSection</name>
    <message>
        <source>Limits</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;At least</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>At mos&amp;t</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Bands at</source>
        <translation type="unfinished"></translation>
    </message>
    <message numerus="yes">
        <source>%1 to %2 %3, %n bands</source>
        <translation type="unfinished">
            <numerusform></numerusform>
        </translation>
    </message>
</context>
<context>
    <name>stillhead::MoreSection</name>
    <message>
        <source>More</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Join lines that cross</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Laterals at least</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Laterals at most</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Join within</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Source within</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Depth of sags</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Error of the terrain</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Error of the reading</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Join lines that cross</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::Place</name>
    <message>
        <source>%1 (summer peak) to %2 (night, winter)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no terrain here</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>pipe at %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ground %1, pipe %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 over</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 under</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>within limits</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>joined to no source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no figure: the terrain has no elevation here</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no water at rest: the pipe lies %1 above the static level</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no water at rest: the way here leads over higher pipe</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 feature %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pipe here would hold %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ground lies %1 above the static level</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ground %1</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::Plugin</name>
    <message>
        <source>New plan…</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure along pipes…</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure surface…</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>P&amp;rofile</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Panel</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Results</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>The Processing plugin is not running. Turn it on in Plugins ▸ Manage and Install Plugins, then try again.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Static pressure along irrigation pipe on sloped ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Analysis</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::PreviewInput</name>
    <message>
        <source>Choose the layer that mainlines are drawn in.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>A chosen layer has lost its file; mend it in the layer tree, or choose another.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Draw the first mainline.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Choose the terrain: ground elevations as a raster.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pick where the water comes from.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Give the pressure or water level at the source.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::PreviewTask</name>
    <message>
        <source>Static pressure preview</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::ProfilePlot</name>
    <message>
        <source>Along the way from the source, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Elevation, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>static level, night and winter</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>static level, summer peak</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>within limits</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>pipe, by band</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::ProfileTab</name>
    <message>
        <source>&amp;Way to…</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Click on a pipe: the profile runs to it from the source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the profile as PNG, SVG or CSV…</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Choose “Way to…” and click on a pipe.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>No pipe there; click on a pipe.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>No joined pipe leads there from the source.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 from the source: no figure</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 from the source: pipe %2, %3 (summer peak) to %4 (night, winter)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>distance, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>ground, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>pipe, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>low pressure, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>high pressure, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>low static level, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>high static level, %1</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>“%1” could not be written; check the folder.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the profile</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>PNG (*.png);;SVG (*.svg);;CSV (*.csv)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Saved “%1”.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::Provider</name>
    <message>
        <source>Stillhead: static pressure along irrigation pipe</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::ResultModel</name>
    <message>
        <source>yes</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>no</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::ResultTab</name>
    <message>
        <source>&amp;Copy</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Copy the selected rows, or all</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the list as CSV…</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>This row has no place on the map.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>“%1” could not be written: %2</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Save the list</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>CSV (*.csv)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Saved “%1”.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::ResultsDock</name>
    <message>
        <source>Stillhead results</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>%1 (%2)</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Places</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Stretches</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Findings</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>This place cannot be shown in the map&apos;s CRS.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::SaveResults</name>
    <message>
        <source>Pressure at rest</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::Section</name>
    <message>
        <source>%1: %2</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::SourceLook</name>
    <message>
        <source>No terrain here.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Ground %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water would stand at elevation %1.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Water would stand at elevation %1 (summer peak) to %2 (night, winter).</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::SourcePickTool</name>
    <message>
        <source>Pick the source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Point at a pipe.</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>No pipe within reach here; click on a pipe.</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::UnitsBar</name>
    <message>
        <source>&amp;Units</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pressure unit</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Length unit</source>
        <translation type="unfinished"></translation>
    </message>
</context>
<context>
    <name>stillhead::WaterSection</name>
    <message>
        <source>Water</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Source</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Known</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Night, winter</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Summer peak</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Gauge above ground</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Surveyed gr&amp;ound</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pump at no &amp;flow</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Pump &amp;running</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>Not&amp;e</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Pick on the map</source>
        <translation type="unfinished"></translation>
    </message>
    <message>
        <source>&amp;Pick another place</source>
        <translation type="unfinished"></translation>
    </message>
</context>
</TS>
