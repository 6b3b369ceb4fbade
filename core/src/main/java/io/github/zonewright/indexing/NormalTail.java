package io.github.zonewright.indexing;

/** ln Φ(z), the logarithm of the normal distribution function, from a table; floored, so that no single node decides all. */
final class NormalTail {

    /** The least value given: a stronger contradiction than one in ninety is not believed of a single node. */
    static final double FLOOR = -4.5;

    private static final double FIRST = -4;
    private static final int PER_UNIT = 64;
    private static final double[] TABLE = table();

    private NormalTail() {}

    static double lnPhi(double z) {
        double t = (z - FIRST) * PER_UNIT;
        if (t <= 0) {
            return FLOOR;
        }
        int i = (int) t;
        if (i >= TABLE.length - 1) {
            return 0;
        }
        return TABLE[i] + (t - i) * (TABLE[i + 1] - TABLE[i]);
    }

    private static double[] table() {
        double[] table = new double[10 * PER_UNIT + 1];
        for (int i = 0; i < table.length; i++) {
            double z = FIRST + i / (double) PER_UNIT;
            table[i] = Math.max(FLOOR, Math.log(upperTail(-z)));
        }
        return table;
    }

    /** The upper tail of the normal distribution, by Simpson's rule. */
    private static double upperTail(double z) {
        int n = 400;
        double upper = Math.max(z + 1, 9);
        double h = (upper - z) / n;
        double sum = 0;
        for (int i = 0; i <= n; i++) {
            double x = z + i * h;
            double weight = i == 0 || i == n ? 1 : i % 2 == 1 ? 4 : 2;
            sum += weight * Math.exp(-x * x / 2);
        }
        return sum * h / 3 / Math.sqrt(2 * Math.PI);
    }
}
