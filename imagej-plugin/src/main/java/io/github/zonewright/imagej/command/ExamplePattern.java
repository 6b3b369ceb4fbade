package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.io.Opener;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.imagej.session.CrystalChoice;
import io.github.zonewright.imagej.session.Instrument;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.microscope.Beam;
import java.io.FileNotFoundException;
import java.io.IOException;
import java.io.InputStream;
import java.util.Properties;

/**
 * The example pattern, from the materials laboratory of the invented Harrow Quay pump works, and what its microscopist
 * knows of it.
 *
 * @param image the pattern
 * @param crystal the crystal
 * @param kilovolts accelerating voltage in kV
 * @param cameraConstant camera constant in px·Å, as told
 * @param tolerance how far that may be off, as a part of it
 */
public record ExamplePattern(
        ImagePlus image, Crystal crystal, double kilovolts, double cameraConstant, double tolerance) {
    private static final String FOLDER = "/io/github/zonewright/imagej/demo/";
    private static final String NAME = "harrow-quay";

    /**
     * Loads it from the jar.
     *
     * @return the example
     * @throws IOException if the jar lacks it
     */
    public static ExamplePattern load() throws IOException {
        Properties known = new Properties();
        try (InputStream in = resource(NAME + ".properties")) {
            known.load(in);
        }
        try (InputStream in = resource(NAME + ".tif")) {
            ImagePlus image = new Opener().openTiff(in, NAME + ".tif");
            return new ExamplePattern(
                    image,
                    CrystalChoice.of(known.getProperty("crystal"), null),
                    number(known, "kilovolts"),
                    number(known, "camera-constant"),
                    number(known, "tolerance"));
        }
    }

    /**
     * The search that what is known suggests.
     *
     * @return the search
     */
    public Search search() {
        return new Search(crystal, Beam.ofKilovolts(kilovolts), cameraConstant, tolerance, false);
    }

    /** Keeps what is known with the image, where the workbench looks for it. */
    public void keep() {
        new Instrument(kilovolts, ScaleKind.PIXELS, cameraConstant, 1, 1, 100 * tolerance, false)
                .keepWith(image, crystal);
    }

    private static double number(Properties known, String key) {
        return Double.parseDouble(known.getProperty(key));
    }

    private static InputStream resource(String name) throws IOException {
        InputStream in = ExamplePattern.class.getResourceAsStream(FOLDER + name);
        if (in == null) {
            throw new FileNotFoundException("the example pattern " + name + " is not in this jar");
        }
        return in;
    }
}
