package io.github.zonewright.document;

import io.github.zonewright.cif.AtomicFile;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.pattern.LowestZones;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Path;
import java.util.List;

/**
 * The lowest zones of a crystal as a sheet of computed patterns, at a true scale, to be held beside an image.
 *
 * <p>It is one file of HTML with drawings in SVG, in UTF-8, well-formed as XML too, which fetches nothing and runs nothing.
 * Lengths stand in it in millimetres, so it is true to scale when printed at 100 %. The larger the scale, the fewer patterns
 * stand side by side.
 *
 * <p>Known limit: zero layers alone, exactly on zone, with the intensities of single scattering in a bent foil.
 *
 * @param crystal the crystal
 * @param beam the beam
 * @param zones the zone axes, in the order in which they are drawn
 * @param scale camera constant on paper in mm·Å: a spot of spacing d lies scale/d from the centre
 */
public record ZoneChart(Crystal crystal, Beam beam, List<Uvw> zones, double scale) {
    /** Screens count a pixel of a page as 1/96 inch (CSS Values and Units, level 3). */
    private static final double MILLIMETRES_PER_PIXEL = 25.4 / 96;

    /**
     * Checks the values.
     *
     * @throws IllegalArgumentException if there is no zone, or the scale is not from 1 to 10,000 mm·Å
     */
    public ZoneChart {
        zones = List.copyOf(zones);
        if (zones.isEmpty()) {
            throw new IllegalArgumentException("zones of the chart: none, expected at least one");
        }
        if (!(scale >= 1 && scale <= 10_000)) {
            throw new IllegalArgumentException("scale on paper: " + scale + " mm·Å, expected 1 to 10000 mm·Å");
        }
    }

    /**
     * The chart of the lowest zones.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param count how many zones, 1 to 60
     * @param scale camera constant on paper in mm·Å
     * @return the chart
     * @throws IllegalArgumentException if count or scale is out of range
     */
    public static ZoneChart of(Crystal crystal, Beam beam, int count, double scale) {
        return new ZoneChart(crystal, beam, LowestZones.of(crystal, count), scale);
    }

    /**
     * The scale at which the chart on a screen at 100 % has the size of an image at 100 %.
     *
     * @param constant camera constant of the image in px·Å
     * @return camera constant on paper in mm·Å, with 96 px to the inch
     */
    public static double scaleOnScreen(double constant) {
        return constant * MILLIMETRES_PER_PIXEL;
    }

    /**
     * The sheet.
     *
     * @return the text of the file, to be stored as UTF-8
     * @throws IllegalArgumentException if the crystal has too many reflections for the scale
     */
    public String toHtml() {
        return new ChartPage(this).html();
    }

    /**
     * Writes the sheet, whole or not at all.
     *
     * @param path the file
     * @throws IOException if it cannot be written; an older file is then as it was
     * @throws IllegalArgumentException if the crystal has too many reflections for the scale
     */
    public void write(Path path) throws IOException {
        AtomicFile.write(path, toHtml().getBytes(StandardCharsets.UTF_8));
    }
}
