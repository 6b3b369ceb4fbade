package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class ResidualPlotTest {
    private static SpotMatch match(double x, double y, double dx, double dy) {
        MeasuredSpot measured = new MeasuredSpot(new PixelPoint(x + dx, y + dy), 0.1, 100, 20, false);
        return new SpotMatch(measured, new Hkl(1, 0, 0), new PixelPoint(x, y));
    }

    /**
     * By hand: the spots are 40 px apart, so arrows may be as long; the longest residual is 0.5 px, and 40/0.5 = 80 rounds
     * down to 50. The bar may then stand for 40/50 = 0.8 px, rounded down 0.5 px, and is drawn 25 px long.
     */
    @Test
    void of_enlargesByARoundFactor() {
        ResidualPlot plot = ResidualPlot.of(
                        List.of(match(100, 100, 0.3, -0.4), match(140, 100, 0, 0.2), match(100, 200, 0, 0)))
                .orElseThrow();
        assertEquals(50, plot.factor(), 1e-9);
        assertEquals(0.5, plot.bar(), 1e-12);
        assertEquals(25, plot.barLength(), 1e-9);
        assertEquals(3, plot.arrows().size());
        assertEquals(new PixelPoint(100, 100), plot.arrows().get(0).from());
        assertEquals(115, plot.arrows().get(0).to().x(), 1e-9);
        assertEquals(80, plot.arrows().get(0).to().y(), 1e-9);
        assertEquals(plot.arrows().get(2).from(), plot.arrows().get(2).to());
    }

    /** On a picture twice as large all is twice as long; factor and bar still speak of the image. */
    @Test
    void scaled_saysTheSame() {
        ResidualPlot plot = ResidualPlot.of(List.of(match(100, 100, 0.3, -0.4), match(140, 100, 0, 0.2)))
                .orElseThrow()
                .scaled(2);
        assertEquals(50, plot.factor(), 1e-9);
        assertEquals(0.5, plot.bar(), 1e-12);
        assertEquals(50, plot.barLength(), 1e-9);
        assertEquals(230, plot.arrows().get(0).to().x(), 1e-9);
        assertEquals(160, plot.arrows().get(0).to().y(), 1e-9);
    }

    /** A perfect fit is enlarged by no more than a thousand, a bad one never made smaller. */
    @Test
    void factor_hasItsLimits() {
        ResidualPlot perfect = ResidualPlot.of(List.of(match(100, 100, 0, 0), match(140, 100, 0, 0)))
                .orElseThrow();
        assertEquals(1000, perfect.factor(), 1e-9);
        assertTrue(perfect.bar() > 0);
        ResidualPlot bad = ResidualPlot.of(List.of(match(100, 100, 60, 0), match(140, 100, 0, 0)))
                .orElseThrow();
        assertEquals(1, bad.factor(), 1e-9);
        assertEquals(160, bad.arrows().get(0).to().x(), 1e-9);
    }

    @Test
    void of_oneSpotOrNone() {
        assertEquals(Optional.empty(), ResidualPlot.of(List.of()));
        ResidualPlot one = ResidualPlot.of(List.of(match(100, 100, 1, 0))).orElseThrow();
        assertEquals(50, one.factor(), 1e-9);
    }
}
