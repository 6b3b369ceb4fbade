package io.github.zonewright.imagej.bridge;

import ij.gui.Plot;
import io.github.zonewright.calibration.MeasuredRing;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.PowderLine;
import io.github.zonewright.calibration.RingAssignment;
import io.github.zonewright.calibration.RingCalibration.Fitted;
import io.github.zonewright.image.RadialProfile;
import java.awt.Color;
import java.awt.Font;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;

/** Plots of the rings of a powder, as ImageJ's own plots. */
public final class RingPlots {
    private static final int WIDTH = 440;
    private static final int HEIGHT = 150;
    private static final double PERCENT = 100;
    private static final double ROOM = 1.18;
    private static final Color CURVE = Color.BLACK;
    private static final Color LINE = new Color(0x0060B0);
    private static final Color STRAY = new Color(0xC05000);
    private static final Color ZERO = new Color(0x909090);

    private RingPlots() {}

    /**
     * The radial profile with the places of the rings: blue lines where the standard has a line that explains a ring, with its
     * indices; orange ones at rings that no line explains.
     *
     * @param measured the rings
     * @param fitted the calibration; empty where the rings were refused
     * @return the plot of the mean grey value against the radius in px; empty axes where there is no profile
     */
    public static Plot profile(MeasuredRings measured, Optional<Fitted> fitted) {
        Plot plot = plot("Radial profile of rings", "radius (px)", "mean grey value");
        Optional<RadialProfile> profile = measured.profile();
        if (profile.isEmpty() || measured.rings().isEmpty()) {
            plot.setLimits(0, 1, 0, 1);
            return plot;
        }
        List<MeasuredRing> rings = measured.rings();
        double from = 0.7 * rings.get(0).radius().value();
        double to = 1.1 * rings.get(rings.size() - 1).radius().value();
        List<double[]> points = points(profile.get(), from, to);
        double low = points.stream().mapToDouble(p -> p[1]).min().orElse(0);
        double high = points.stream().mapToDouble(p -> p[1]).max().orElse(1);
        double top = low + ROOM * Math.max(high - low, 1e-9);
        plot.setLimits(from, to, low, top);
        List<MeasuredRing> strays = fitted.map(Fitted::unexplained).orElse(rings);
        strays.forEach(ring -> vertical(plot, STRAY, ring.radius().value(), low, top));
        fitted.ifPresent(f -> lines(plot, f, from, to, low, top));
        plot.setColor(CURVE);
        plot.setLineWidth(1);
        plot.add(
                "line",
                points.stream().mapToDouble(p -> p[0]).toArray(),
                points.stream().mapToDouble(p -> p[1]).toArray());
        return plot;
    }

    /** The lines of the standard; where two would overlap, the second has no name. */
    private static void lines(Plot plot, Fitted fitted, double from, double to, double low, double top) {
        double written = -1;
        for (RingAssignment ring : fitted.rings()) {
            double at = fitted.constant().value()
                    * ring.line().reducedRadius(fitted.beam().wavelength());
            vertical(plot, LINE, at, low, low + (top - low) / ROOM);
            double place = (at - from) / (to - from);
            if (place > written) {
                plot.setColor(LINE);
                plot.setJustification(Plot.CENTER);
                plot.addLabel(place, 0.1, name(ring.line()));
                written = place + 0.1;
            }
        }
    }

    /** The strongest form, written closely where that is plain. */
    private static String name(PowderLine line) {
        String form = RingTable.forms(line).replaceAll("\\}.*", "}");
        return form.matches("\\{\\d \\d \\d\\}") ? form.replace(" ", "") : form;
    }

    private static void vertical(Plot plot, Color colour, double at, double low, double high) {
        plot.setColor(colour);
        plot.setLineWidth(1);
        plot.drawLine(at, low, at, high);
    }

    private static List<double[]> points(RadialProfile profile, double from, double to) {
        List<double[]> points = new ArrayList<>();
        for (int bin = 0; bin < profile.size(); bin++) {
            double r = profile.radius(bin);
            if (profile.count(bin) > 0 && r >= from && r <= to) {
                points.add(new double[] {r, profile.mean(bin)});
            }
        }
        return points;
    }

    /**
     * The residuals: d measured less d of the standard in % of the latter, against d, with standard uncertainties.
     *
     * @param fitted the calibration
     * @return the plot
     */
    public static Plot residuals(Fitted fitted) {
        List<RingAssignment> rings = fitted.rings().stream()
                .sorted(Comparator.comparingDouble(r -> r.line().d()))
                .toList();
        double[] d = rings.stream().mapToDouble(r -> r.line().d()).toArray();
        double[] off =
                rings.stream().mapToDouble(r -> PERCENT * r.relativeResidual()).toArray();
        double[] error = rings.stream()
                .mapToDouble(r -> PERCENT * r.spacing().error() / r.line().d())
                .toArray();
        double most = 0.01;
        for (int i = 0; i < d.length; i++) {
            most = Math.max(most, Math.abs(off[i]) + error[i]);
        }
        double span = d[d.length - 1] - d[0];
        double from = d[0] - 0.08 * span;
        double to = d[d.length - 1] + 0.08 * span;
        Plot plot = plot("Residuals of rings", "d of the standard (Å)", "residual (%)");
        plot.setLimits(from, to, -ROOM * most, ROOM * most);
        plot.setColor(ZERO);
        plot.drawLine(from, 0, to, 0);
        plot.setColor(LINE, LINE);
        plot.setLineWidth(1);
        plot.addPoints(d, off, error, Plot.CIRCLE);
        return plot;
    }

    private static Plot plot(String title, String x, String y) {
        Plot plot = new Plot(title, x, y);
        plot.setFrameSize(WIDTH, HEIGHT);
        plot.setFont(new Font(Font.SANS_SERIF, Font.PLAIN, 12));
        plot.setAxisLabelFont(Font.PLAIN, 12);
        return plot;
    }
}
