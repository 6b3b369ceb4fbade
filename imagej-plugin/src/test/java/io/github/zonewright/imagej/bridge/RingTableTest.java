package io.github.zonewright.imagej.bridge;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.measure.ResultsTable;
import io.github.zonewright.calibration.RingCalibration;
import io.github.zonewright.calibration.RingCalibrator;
import io.github.zonewright.calibration.RingFinder;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.imagej.RingPatterns;
import io.github.zonewright.microscope.Beam;
import org.junit.jupiter.api.Test;

class RingTableTest {
    /** d of {1 1 1} of aluminium: 4.0494 Å/√3 = 2.338 Å (ICDD 4-787), from memory. */
    @Test
    void of_aluminium_firstRowIsTheInnermostRing() {
        RingCalibration.Fitted fitted = (RingCalibration.Fitted) RingCalibrator.of(Beam.ofKilovolts(200))
                .calibrate(
                        RingFinder.withDefaults().find(ImagePixels.of(RingPatterns.aluminium())),
                        CrystalShelf.find("aluminium").orElseThrow());
        ResultsTable table = RingTable.of(fitted);
        assertEquals(
                fitted.rings().size()
                        + fitted.unexplained().size()
                        + fitted.missing().size(),
                table.size());
        assertEquals("{1 1 1}", table.getStringValue("{hkl}", 0));
        assertEquals(2.338, table.getValue("d (Å)", 0), 0.002);
        assertEquals(2.338, table.getValue("d measured (Å)", 0), 0.004);
        assertEquals(RingPatterns.CONSTANT / 2.338, table.getValue("radius (px)", 0), 0.1);
        assertTrue(Math.abs(table.getValue("residual (%)", 0)) < 0.2);
        assertEquals("explained", table.getStringValue("kind", 0));
    }
}
