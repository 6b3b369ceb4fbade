package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.gui.Plot;
import io.github.zonewright.calibration.MeasuredRings;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.calibration.RingCalibrator;
import io.github.zonewright.calibration.RingFinder;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.imagej.RingPatterns;
import io.github.zonewright.microscope.Beam;
import java.util.Optional;
import org.junit.jupiter.api.Test;

class RingPlotsTest {
    private final MeasuredRings rings = RingFinder.withDefaults().find(ImagePixels.of(RingPatterns.aluminium()));
    private final RingCalibration.Fitted fitted = (RingCalibration.Fitted) RingCalibrator.of(Beam.ofKilovolts(200))
            .calibrate(rings, CrystalShelf.find("aluminium").orElseThrow());

    @Test
    void profile_isHighestAtTheFirstRing() {
        Plot plot = RingPlots.profile(rings, Optional.of(fitted));
        double[] limits = plot.getLimits();
        assertTrue(limits[0] < 76.9 && limits[1] > 150, limits[0] + " to " + limits[1]);
        float[] r = plot.getXValues();
        float[] grey = plot.getYValues();
        int top = 0;
        for (int i = 0; i < grey.length; i++) {
            top = grey[i] > grey[top] ? i : top;
        }
        // 180 px·Å over d of {111}, 4.0494/√3 Å.
        assertEquals(180 / (4.0494 / Math.sqrt(3)), r[top], 0.8);
        assertEquals("radius (px)", plot.getLabel('x'));
        assertEquals("mean grey value", plot.getLabel('y'));
    }

    @Test
    void residuals_areInPerCentOfD() {
        Plot plot = RingPlots.residuals(fitted);
        assertEquals(fitted.rings().size(), plot.getXValues().length);
        int last = fitted.rings().size() - 1;
        assertEquals(fitted.rings().get(0).line().d(), plot.getXValues()[last], 1e-6);
        assertEquals(100 * fitted.rings().get(0).relativeResidual(), plot.getYValues()[last], 1e-5);
        assertEquals("d of the standard (Å)", plot.getLabel('x'));
        assertEquals("residual (%)", plot.getLabel('y'));
    }

    @Test
    void profile_withoutRings_isEmpty() {
        MeasuredRings none = RingFinder.withDefaults()
                .find(ImagePixels.of(new ij.ImagePlus("blank", new ij.process.ByteProcessor(64, 64))));
        assertTrue(RingPlots.profile(none, Optional.empty()).getProcessor().getWidth() > 100);
    }
}
