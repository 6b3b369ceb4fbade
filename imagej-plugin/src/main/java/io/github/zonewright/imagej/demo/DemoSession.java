package io.github.zonewright.imagej.demo;

import ij.IJ;
import ij.ImageJ;
import io.github.zonewright.imagej.command.ExamplePattern;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.imagej.workbench.OpenWorkbench;
import io.github.zonewright.indexing.SearchResult;
import io.github.zonewright.spots.MeasuredPattern;
import java.io.IOException;

/** ImageJ with the example, its solution and the workbench, as the demo leaves it on the screen. */
final class DemoSession {
    private static final int FRAMED_AFTER = 1000;

    private DemoSession() {}

    /**
     * Starts ImageJ.
     *
     * @param arguments none
     * @throws IOException if the example can't be read
     */
    public static void main(String[] arguments) throws IOException {
        ImageJ imagej = new ImageJ();
        imagej.exitWhenQuitting(true);
        ExamplePattern example = ExamplePattern.load();
        example.keep();
        MeasuredPattern measured = Search.measure(example.image());
        SearchResult result = example.search().run(measured, part -> {}, () -> false);
        example.image().show();
        Sitting.EMPTY
                .withMeasured(measured)
                .withSolutions(result.solutions())
                .withLabels(true)
                .show(example.image());
        new OpenWorkbench().run();
        // ImageJ may have drawn the line above the image before the window manager framed the window, and again after.
        IJ.wait(FRAMED_AFTER);
        example.image().getWindow().repaint();
    }
}
