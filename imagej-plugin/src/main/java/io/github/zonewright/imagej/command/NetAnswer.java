package io.github.zonewright.imagej.command;

import io.github.zonewright.spots.MeasuredValue;
import io.github.zonewright.spots.SpotNet;
import java.util.Locale;

/** A measured net in words and numbers for a person: px and degrees, each with its standard uncertainty. */
final class NetAnswer {
    private NetAnswer() {}

    /** One line: lengths, ratio and angle of a net; the spacing of a row; or why there is neither. */
    static String line(SpotNet net) {
        if (net instanceof SpotNet.Net found) {
            return "Net: a " + number(found.lengthA(), 3, " px") + ", b " + number(found.lengthB(), 3, " px")
                    + ", b/a " + number(found.ratio(), 4, "") + ", angle " + degrees(found.angle())
                    + counts(found.nodes().size(), found.strays().size(), found.rms());
        }
        if (net instanceof SpotNet.SystematicRow row) {
            return "Row: spacing " + number(row.spacing(), 3, " px") + ", azimuth " + degrees(row.azimuth())
                    + counts(row.nodes().size(), row.strays().size(), row.rms())
                    + " Nothing is known across a row.";
        }
        return ((SpotNet.NoNet) net).reason();
    }

    /** Value and standard uncertainty with these decimals and the unit behind both. */
    static String number(MeasuredValue measured, int decimals, String unit) {
        return String.format(
                Locale.ROOT, "%." + decimals + "f ± %." + decimals + "f%s", measured.value(), measured.error(), unit);
    }

    /** An angle in radians as degrees. */
    static String degrees(MeasuredValue radians) {
        return number(radians.times(Math.toDegrees(1)), 2, "°");
    }

    private static String counts(int on, int off, double rms) {
        return String.format(Locale.ROOT, "; %d spots on it, %d off it, residual %.2f px.", on, off, rms);
    }
}
