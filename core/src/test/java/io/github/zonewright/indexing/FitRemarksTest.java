package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.ZoneSetting;
import java.util.List;
import org.junit.jupiter.api.Test;

class FitRemarksTest {

    private static List<String> remarks(double leanErrorDegrees, double correlation, double constantError) {
        NetFit.Prior prior = NetFit.Prior.ofCamera(0, 0, 1, Math.log(200), constantError, 0, 0, constantError);
        double leanError = Math.toRadians(leanErrorDegrees);
        SolutionErrors errors = new SolutionErrors(1e-4, leanError, leanError / 2, 0.05, 0.05, 0.2);
        return FitRemarks.of(prior, errors, 200, new Vector2(Math.toRadians(2), 0), correlation, 0.003);
    }

    @Test
    void of_leanSureAndAllHeld_nothingToSay() {
        assertEquals(List.of(), remarks(0.4, 0.5, 1e-6));
    }

    @Test
    void of_uncertainLean_saysHowFar() {
        assertEquals(
                List.of("The lean of 2.0 degrees is uncertain: it is known to 0.8 degrees only."),
                remarks(0.8, 0, 1e-6));
    }

    @Test
    void of_correlationOfEitherSign_said() {
        for (double correlation : new double[] {0.95, -0.95}) {
            List<String> said = remarks(0.1, correlation, 1e-6);
            assertEquals(1, said.size());
            assertTrue(said.get(0).startsWith("Lean and ellipse are not told apart"), said.get(0));
        }
    }

    @Test
    void of_freeCamera_asGoodAsTheCell() {
        List<String> said = remarks(0.1, 0, 0.01);
        assertEquals(2, said.size());
        assertTrue(said.get(0).contains("known to 0.10 %"), said.get(0));
        assertTrue(said.get(1).contains("known to 0.30 %"), said.get(1));
    }

    @Test
    void ofHalfTurn_anotherLean_bothAreSaid() {
        ZoneSetting own =
                new ZoneSetting(new Uvw(1, 1, 1), new Hkl(1, -1, 0), 0.3, Math.toRadians(-3.5), Math.toRadians(-4.1));
        assertEquals(
                "The crystal may lean another way: half a turn about the zone axis goes with a lean of 3.6 degrees to the"
                        + " right and 4.4 upwards, in place of -3.5 and -4.1.",
                FitRemarks.ofHalfTurn(own, new Vector2(Math.toRadians(3.6), Math.toRadians(4.4)))
                        .orElseThrow());
        assertTrue(FitRemarks.ofHalfTurn(own, new Vector2(Math.toRadians(-3), Math.toRadians(-4)))
                .isEmpty());
    }
}
