package io.github.zonewright.geometry;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import org.junit.jupiter.api.Test;

class LeastSquaresTest {

    /** Line through (0, 1), (1, 3), (2, 4), (3, 4) by hand: slope 1, intercept 1.5; Σr² = 1. */
    @Test
    void solve_lineThroughFourPoints_asByHand() {
        LeastSquares fit = new LeastSquares(2);
        double[] y = {1, 3, 4, 4};
        for (int x = 0; x < 4; x++) {
            fit.add(new double[] {1, x}, y[x], 1);
        }
        LeastSquares.Result result = fit.solve().orElseThrow();
        assertEquals(1.5, result.values()[0], 1e-12);
        assertEquals(1, result.values()[1], 1e-12);
        assertEquals(1, result.chiSquare(), 1e-12);
        assertEquals(2, result.degreesOfFreedom());
        assertEquals(0.5, result.reducedChiSquare(), 1e-12);
        // (XᵀX)⁻¹ = ((14, −6), (−6, 4))/20.
        assertEquals(0.7, result.covariance()[0][0], 1e-12);
        assertEquals(-0.3, result.covariance()[0][1], 1e-12);
        assertEquals(0.2, result.covariance()[1][1], 1e-12);
    }

    @Test
    void solve_weight_countsLikeRepetition() {
        LeastSquares twice = new LeastSquares(1);
        twice.add(new double[] {1}, 4, 1);
        twice.add(new double[] {1}, 7, 2);
        assertEquals(6, twice.solve().orElseThrow().values()[0], 1e-12);
    }

    @Test
    void solve_undetermined_isEmpty() {
        LeastSquares fit = new LeastSquares(2);
        assertTrue(fit.solve().isEmpty());
        fit.add(new double[] {1, 2}, 1, 1);
        fit.add(new double[] {2, 4}, 2, 1);
        assertTrue(fit.solve().isEmpty());
    }

    @Test
    void add_wrongLength_isRefused() {
        assertThrows(IllegalArgumentException.class, () -> new LeastSquares(2).add(new double[1], 0, 1));
        assertThrows(IllegalArgumentException.class, () -> new LeastSquares(0));
    }
}
