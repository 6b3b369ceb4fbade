package io.github.zonewright.calibration;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredValue;
import java.util.List;

/** What the rings of a known powder say about the camera: a scale, or a refusal with its reason. */
public sealed interface RingCalibration {

    /**
     * A camera.
     *
     * @param standard the crystal that the rings were taken to be of
     * @param beam the beam
     * @param camera centre, constant and ellipse; its azimuth is that of the microscope frame
     * @param constant the camera constant in px·Å with its uncertainty; the standard's own cell is taken as exact
     * @param shape centre and ellipse as on the screen, with uncertainties
     * @param rings the rings that lines of the standard explain, from the inside out
     * @param unexplained rings that none does
     * @param missing lines that ought to show between the rings and do not
     * @param standardFits whether the standard explains the rings; if not, the constant is worth nothing
     * @param others how other standards do with the same rings, the best first
     * @param notices sentences for the user: what does not fit, what fits better or as well, what is dangerous
     */
    record Fitted(
            Crystal standard,
            Beam beam,
            Camera camera,
            MeasuredValue constant,
            RingShape shape,
            List<RingAssignment> rings,
            List<MeasuredRing> unexplained,
            List<PowderLine> missing,
            boolean standardFits,
            List<StandardRank> others,
            List<String> notices)
            implements RingCalibration {

        /** Copies the lists. */
        public Fitted {
            rings = List.copyOf(rings);
            unexplained = List.copyOf(unexplained);
            missing = List.copyOf(missing);
            others = List.copyOf(others);
            notices = List.copyOf(notices);
        }
    }

    /**
     * No camera.
     *
     * @param reason a sentence for the user
     * @param others standards that would fit, the best first
     */
    record Refused(String reason, List<StandardRank> others) implements RingCalibration {

        /** Copies the list. */
        public Refused {
            others = List.copyOf(others);
        }
    }

    /**
     * How a standard does with the rings.
     *
     * @param standard the crystal
     * @param constant the camera constant it would give, in px·Å
     * @param explained number of rings it explains
     * @param score log-likelihood ratio against chance, in nats; only differences on the same rings count
     * @param fits whether it explains the rings
     */
    record StandardRank(Crystal standard, double constant, int explained, double score, boolean fits) {}
}
