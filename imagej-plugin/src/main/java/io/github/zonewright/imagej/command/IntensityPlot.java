package io.github.zonewright.imagej.command;

import ij.gui.Plot;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LineProfile;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.RadialProfile;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.spots.MeasuredPattern;
import java.util.stream.IntStream;

/**
 * Plots of the grey value against the distance from the centre: in px, or as distance over camera constant, which is 1/d but
 * for the tangent of the flat detector.
 */
public final class IntensityPlot {
    private static final String GREY = "Grey value";
    private static final double BAND_IN_WIDTHS = 3;

    /** From so large a ratio of the largest to the smallest value on, the values are plotted by their logarithm. */
    private static final double STEEP = 30;

    private IntensityPlot() {}

    /**
     * Along the row through the centre and a spot, from one edge of the frame to the other.
     *
     * @param title title of the plot
     * @param pixels the image
     * @param measured what was measured on it
     * @param ruler the ruler; gives the centre, and the scale where there is one
     * @param spot a place of the row off the centre
     * @return the plot, towards the spot on the right
     * @throws IllegalArgumentException if there is no centre or the spot is at the centre
     */
    public static Plot along(String title, GrayImage pixels, MeasuredPattern measured, Ruler ruler, PixelPoint spot) {
        PixelPoint centre = centre(ruler);
        Vector2 way = spot.minus(centre);
        if (!(way.norm() >= 1)) {
            throw new IllegalArgumentException("profile: the spot " + spot.x() + ", " + spot.y()
                    + " px is at the centre, expected a spot at least 1 px from it");
        }
        Vector2 unit = way.times(1 / way.norm());
        double back = toEdge(centre, unit.times(-1), pixels);
        double on = Math.max(toEdge(centre, unit, pixels), way.norm());
        LineProfile profile = LineProfile.of(
                pixels,
                centre.plus(unit.times(-back)),
                centre.plus(unit.times(on)),
                BAND_IN_WIDTHS * measured.spotSigma());
        double[] x = IntStream.range(0, profile.size())
                .mapToDouble(i -> i * profile.step() - back)
                .toArray();
        double[] y =
                IntStream.range(0, profile.size()).mapToDouble(profile::value).toArray();
        return plot(title, ruler, x, y);
    }

    /**
     * Averaged about the centre, without the hidden area.
     *
     * @param title title of the plot
     * @param pixels the image
     * @param measured what was measured on it
     * @param ruler the ruler; gives the centre, and the scale where there is one
     * @return the plot
     * @throws IllegalArgumentException if there is no centre
     */
    public static Plot about(String title, GrayImage pixels, MeasuredPattern measured, Ruler ruler) {
        RadialProfile profile = RadialProfile.of(pixels, Ellipse.circle(centre(ruler)), measured.hidden(), 1);
        int[] bins = IntStream.range(0, profile.size())
                .filter(i -> profile.count(i) > 0)
                .toArray();
        double[] x = IntStream.of(bins).mapToDouble(profile::radius).toArray();
        double[] y = IntStream.of(bins).mapToDouble(profile::mean).toArray();
        return plot(title, ruler, x, y);
    }

    private static PixelPoint centre(Ruler ruler) {
        return ruler.centre()
                .orElseThrow(() -> new IllegalArgumentException("profile: the centre is not known, set it first"))
                .position();
    }

    private static Plot plot(String title, Ruler ruler, double[] pixels, double[] grey) {
        String axis = "Distance from the centre (px)";
        double[] x = pixels;
        if (ruler.scale().isPresent()) {
            LengthUnit unit = LengthUnit.last();
            double perPixel = 1 / unit.of(ruler.scale().get().constant());
            axis = "1/d (1/" + unit.label() + ")";
            x = IntStream.range(0, pixels.length)
                    .mapToDouble(i -> pixels[i] * perPixel)
                    .toArray();
        }
        Plot plot = new Plot(title, axis, GREY);
        plot.setColor(java.awt.Color.BLACK);
        plot.add("line", x, grey);
        double least = IntStream.range(0, grey.length)
                .mapToDouble(i -> grey[i])
                .filter(Double::isFinite)
                .min()
                .orElse(0);
        double most = IntStream.range(0, grey.length)
                .mapToDouble(i -> grey[i])
                .filter(Double::isFinite)
                .max()
                .orElse(0);
        if (least > 0 && most > STEEP * least) {
            plot.setAxisYLog(true);
        }
        return plot;
    }

    /** How far it is from a point to the edge of the frame in a direction; 0 from outside the frame. */
    private static double toEdge(PixelPoint from, Vector2 unit, GrayImage frame) {
        double x =
                unit.x() == 0 ? Double.POSITIVE_INFINITY : ((unit.x() > 0 ? frame.width() : 0) - from.x()) / unit.x();
        double y =
                unit.y() == 0 ? Double.POSITIVE_INFINITY : ((unit.y() > 0 ? frame.height() : 0) - from.y()) / unit.y();
        return Math.max(0, Math.min(x, y));
    }
}
