package io.github.zonewright.cif;

import java.math.BigDecimal;
import java.math.MathContext;

/**
 * Angles, in degrees in a file and in radians in memory, with no bit lost on the way.
 *
 * <p>A file shows angles in degrees, yet about a tenth of all {@code double} values are the radians of no {@code double}
 * in degrees. Hence two forms. A number of up to {@value #MOST_ORDINARY_DIGITS} digits means
 * {@link Math#toRadians(double)} of its nearest {@code double}, as everywhere else, so that what was typed as 30.1
 * stands as 30.1. A number of more digits means the {@code double} nearest to that number times π/180. The first is
 * written where it gives back the same radians, else the second. A reader that does not know this is off by one unit in
 * the last place of the radians.
 */
public final class CifDegrees {
    /** The most digits of a number that is converted as a {@code double}, which never has more than 17. */
    private static final int MOST_ORDINARY_DIGITS = 19;

    private static final MathContext WRITTEN = new MathContext(22);

    /** π/180 to 50 digits. */
    private static final BigDecimal RADIANS_PER_DEGREE = new BigDecimal(
                    "3.1415926535897932384626433832795028841971693993751")
            .divide(new BigDecimal(180), new MathContext(50));

    private CifDegrees() {}

    /**
     * The value, in degrees, of an angle.
     *
     * @param radians the angle in radians, finite
     * @return the value, which {@link #radians} takes back to the same {@code double}
     * @throws IllegalArgumentException if the angle is not finite
     */
    public static CifValue ofRadians(double radians) {
        if (!Double.isFinite(radians)) {
            throw new IllegalArgumentException("an angle of a CIF is finite, but this is " + radians + " rad");
        }
        double near = Math.toDegrees(radians);
        String best = "";
        for (double degrees : new double[] {near, Math.nextDown(near), Math.nextUp(near)}) {
            String text = Double.toString(degrees);
            boolean same = Double.compare(Math.toRadians(degrees), radians) == 0;
            if (same && (best.isEmpty() || text.length() < best.length())) {
                best = text;
            }
        }
        return CifValue.bare(
                best.isEmpty()
                        ? new BigDecimal(radians)
                                .divide(RADIANS_PER_DEGREE, WRITTEN)
                                .toString()
                        : best);
    }

    /**
     * The angle of a value in degrees.
     *
     * @param value the value
     * @return the angle in radians
     * @throws CifValueException if the value is no number, or beyond the range of a {@code double}
     */
    public static double radians(CifValue value) {
        double degrees = value.asNumber().value();
        String digits = value.text().replaceFirst("\\(.*", "");
        BigDecimal exact = new BigDecimal(digits);
        return exact.precision() <= MOST_ORDINARY_DIGITS
                ? Math.toRadians(degrees)
                : exact.multiply(RADIANS_PER_DEGREE).doubleValue();
    }
}
