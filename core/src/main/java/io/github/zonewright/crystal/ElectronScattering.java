package io.github.zonewright.crystal;

import java.util.List;

/**
 * Elastic electron scattering factors of neutral atoms: f(s) = Σ aᵢ·exp(−bᵢs²), five terms, s = sinθ/λ.
 *
 * <p>Source: International Tables for Crystallography C, table 4.3.2.2 (Peng, Ren, Dudarev and Whelan, Acta Cryst. A52
 * (1996) 257). Worked number: aluminium at s = 0 has f = 5.887 Å.
 *
 * <p>Known limits: atoms are neutral, free and spherical; ions and bonds change f at s below some 0.2 1/Å. The fit holds
 * for s up to 2 1/Å (d = 0.25 Å); above it f is extrapolated and falls off too fast.
 */
public final class ElectronScattering {

    private static final int TERMS = 5;

    /** The table is read once, when first asked for. */
    private static final class Table {
        static final double[][] COEFFICIENTS = read();

        private static double[][] read() {
            List<String[]> rows = ResourceTable.read("electron-scattering-factors.csv");
            double[][] table = new double[rows.size()][2 * TERMS];
            for (int z = 0; z < table.length; z++) {
                for (int i = 0; i < 2 * TERMS; i++) {
                    table[z][i] = Double.parseDouble(rows.get(z)[i + 2]);
                }
            }
            return table;
        }
    }

    private ElectronScattering() {}

    /**
     * The scattering factor of a neutral atom.
     *
     * @param element the element
     * @param s sinθ/λ = |g|/2 in 1/Å, not negative
     * @return f in Å, without the relativistic factor
     */
    public static double factor(Element element, double s) {
        return factor(element.number(), s * s);
    }

    /**
     * The scattering factor of a neutral atom.
     *
     * @param symbol the chemical symbol
     * @param s sinθ/λ = |g|/2 in 1/Å, not negative
     * @return f in Å, without the relativistic factor
     * @throws IllegalArgumentException if there is no such element
     */
    public static double factor(String symbol, double s) {
        return factor(Element.ofSymbol(symbol), s);
    }

    static double factor(int atomicNumber, double squaredS) {
        double[] c = Table.COEFFICIENTS[atomicNumber - 1];
        double sum = 0;
        for (int i = 0; i < TERMS; i++) {
            sum += c[i] * Math.exp(-c[TERMS + i] * squaredS);
        }
        return sum;
    }
}
