package io.github.zonewright.imagej.command;

import io.github.zonewright.calibration.Spacing;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.session.Figures;
import io.github.zonewright.imagej.session.Ruler;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredValue;
import io.github.zonewright.spots.PatternCentre;
import io.github.zonewright.spots.SpotNet;
import java.util.ArrayList;
import java.util.List;
import java.util.Locale;
import java.util.Optional;

/** What was measured on a pattern, in sentences for a person. */
public final class MeasurementAnswer {
    private MeasurementAnswer() {}

    /**
     * All of it, a sentence to a line.
     *
     * @param measured spots and centre
     * @param net the net, row or neither
     * @param ruler the ruler of the image, for spacings where the scale is known
     * @return spots and centre; lengths; ratio and angle; spacings
     */
    public static List<String> lines(MeasuredPattern measured, SpotNet net, Ruler ruler) {
        List<String> lines = new ArrayList<>();
        lines.add(centre(measured));
        if (net instanceof SpotNet.Net found) {
            lines.add("Net: a " + Figures.of(found.lengthA(), " px") + ", b " + Figures.of(found.lengthB(), " px")
                    + ", angle " + Figures.degrees(found.angle()) + ".");
            lines.add("b/a " + Figures.of(found.ratio(), "")
                    + counts(found.nodes().size(), found.strays().size(), found.rms()));
            PixelPoint origin = found.centre().position();
            spacings(ruler, origin, found.a(), found.lengthA(), Optional.of(found.b()), found.lengthB())
                    .ifPresent(lines::add);
        } else if (net instanceof SpotNet.SystematicRow row) {
            lines.add("Row: spacing " + Figures.of(row.spacing(), " px") + ", azimuth "
                    + Figures.degrees(row.azimuth())
                    + counts(row.nodes().size(), row.strays().size(), row.rms()));
            lines.add("Nothing is known across a row.");
            spacings(ruler, row.centre().position(), row.step(), row.spacing(), Optional.empty(), row.spacing())
                    .ifPresent(lines::add);
        } else if (net instanceof SpotNet.NoNet none) {
            lines.add("No net: " + none.reason());
        }
        return lines;
    }

    /** How many spots there are, and the centre. */
    static String centre(MeasuredPattern measured) {
        int count = measured.spots().size();
        return (count == 1 ? "1 spot" : count + " spots")
                + measured.centre().map(c -> "; " + centre(c)).orElse("; no centre is to be seen") + ".";
    }

    /**
     * A centre.
     *
     * @param centre the centre
     * @return place, error and where it comes from
     */
    static String centre(PatternCentre centre) {
        int decimals = Math.max(1, Figures.decimals(centre.error()));
        String from = switch (centre.source()) {
            case DIRECT_BEAM -> "from the direct beam";
            case SPOT_PAIRS -> "from pairs of spots";
            case BACKGROUND -> "from the glow alone";
            case BY_HAND -> "set by hand";
        };
        return String.format(
                Locale.ROOT,
                "centre %." + decimals + "f, %." + decimals + "f ± %." + decimals + "f px, %s",
                centre.position().x(),
                centre.position().y(),
                centre.error(),
                from);
    }

    private static Optional<String> spacings(
            Ruler ruler,
            PixelPoint origin,
            Vector2 a,
            MeasuredValue lengthA,
            Optional<Vector2> b,
            MeasuredValue lengthB) {
        if (ruler.scale().isEmpty()) {
            return Optional.empty();
        }
        Spacing first = ruler.vector(origin, origin.plus(a), lengthA.error());
        String second = b.map(v -> "; of b " + ruler.text(ruler.vector(origin, origin.plus(v), lengthB.error())))
                .orElse("");
        return Optional.of("d of a " + ruler.text(first) + second + ".");
    }

    private static String counts(int on, int off, double rms) {
        return String.format(Locale.ROOT, "; %d spots on it, %d off it, residual %.2f px.", on, off, rms);
    }
}
