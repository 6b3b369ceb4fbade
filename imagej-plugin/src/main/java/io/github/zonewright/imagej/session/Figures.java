package io.github.zonewright.imagej.session;

import io.github.zonewright.spots.MeasuredValue;
import java.util.Locale;

/** Measured numbers as people write them: value ± standard uncertainty, the latter with two digits (GUM 7.2.6). */
public final class Figures {
    private static final int MOST_DECIMALS = 6;
    private static final int EXACT_DECIMALS = 4;

    private Figures() {}

    /**
     * A value and its uncertainty.
     *
     * @param measured the number
     * @param unit what stands behind it, with its leading space
     * @return for example {@code 2.338 ± 0.012 Å}
     */
    public static String of(MeasuredValue measured, String unit) {
        int decimals = decimals(measured.error());
        return String.format(
                Locale.ROOT, "%." + decimals + "f ± %." + decimals + "f%s", measured.value(), measured.error(), unit);
    }

    /**
     * An angle.
     *
     * @param radians the angle
     * @return it in degrees
     */
    public static String degrees(MeasuredValue radians) {
        return of(radians.times(Math.toDegrees(1)), "°");
    }

    /**
     * A part in %.
     *
     * @param percent the number
     * @return as short as it can be said
     */
    public static String percent(double percent) {
        return (percent == Math.rint(percent) ? Long.toString(Math.round(percent)) : Double.toString(percent)) + " %";
    }

    /**
     * A coordinate for a macro.
     *
     * @param pixels the coordinate in px
     * @return it to a thousandth of a pixel
     */
    public static String place(double pixels) {
        return String.format(Locale.ROOT, "%.3f", pixels);
    }

    /**
     * How many decimals an uncertainty bears.
     *
     * @param error the standard uncertainty, 0 or more
     * @return 0 to 6; 4 for an exact number
     */
    public static int decimals(double error) {
        if (!(error > 0)) {
            return EXACT_DECIMALS;
        }
        return (int) Math.max(0, Math.min(MOST_DECIMALS, 1 - Math.floor(Math.log10(error))));
    }
}
