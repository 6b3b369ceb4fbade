package io.github.zonewright.indexing;

import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredSpot;
import io.github.zonewright.spots.MeasuredValue;
import java.time.LocalDate;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * An orientation of a crystal that explains measured spots.
 *
 * <p>What it means: of the zones that were tried for this crystal, this one puts reflections where spots are, with
 * intensities that fit, by that many nats better than accident. It does not mean that no other zone or crystal would do as
 * well: look at the next solutions, above all when few spots are explained. Solutions whose scores lie within some eight
 * nats of each other explain the pattern equally, as far as one image tells.
 *
 * <p>What it cannot know: whether the image was mirrored (the caller says so); whether the crystal is the right one, or its
 * cell, since camera constant and cell only enter by their product; and, when only the zero layer is seen, which of the two
 * orientations half a turn apart about the zone axis is true. The lean comes from intensities alone, and dynamical
 * diffraction may move it by more than its stated error.
 *
 * @param placement crystal, beam, zone axis, rotation, lean and camera, as fitted
 * @param matches the spots it explains
 * @param unexplained the measured spots it leaves over
 * @param rmsResidual root of the mean squared distance between measured and computed places of the explained spots, in px
 * @param score log-likelihood ratio in nats against chance; higher is better. No probability. Among several crystals,
 *     the logarithm of how many more zone axes one tries than another is taken off
 * @param errors standard uncertainties, given that zone and crystal are right
 * @param halfTurn the orientation half a turn about the zone axis away, when it explains the same spots and is not
 *     equivalent by the crystal's symmetry
 * @param remarks sentences on what the spots do not tell apart, and a word where the lean is uncertain by more than 0.5°
 * @param ownScore nats that speak for this crystal against any other whose net lies as near by accident: a net, of however
 *     many spots, tells but three things of a crystal, and intensities are trusted by half. Below 0 an accident is
 *     likelier. Empty where it was not looked at
 */
public record Solution(
        Placement placement,
        List<SpotMatch> matches,
        List<MeasuredSpot> unexplained,
        double rmsResidual,
        double score,
        SolutionErrors errors,
        Optional<Orientation> halfTurn,
        List<String> remarks,
        OptionalDouble ownScore) {

    /** Copies the lists. */
    public Solution {
        matches = List.copyOf(matches);
        unexplained = List.copyOf(unexplained);
        remarks = List.copyOf(remarks);
    }

    /**
     * A solution without remarks.
     *
     * @param placement crystal, beam, zone axis, rotation, lean and camera, as fitted
     * @param matches the spots it explains
     * @param unexplained the measured spots it leaves over
     * @param rmsResidual root of the mean squared distance between measured and computed places, in px
     * @param score log-likelihood ratio in nats against chance
     * @param errors standard uncertainties
     * @param halfTurn the orientation half a turn about the zone axis away, if it is as good
     */
    public Solution(
            Placement placement,
            List<SpotMatch> matches,
            List<MeasuredSpot> unexplained,
            double rmsResidual,
            double score,
            SolutionErrors errors,
            Optional<Orientation> halfTurn) {
        this(placement, matches, unexplained, rmsResidual, score, errors, halfTurn, List.of());
    }

    /**
     * A solution of which it was not looked at how likely an accident is.
     *
     * @param placement crystal, beam, zone axis, rotation, lean and camera, as fitted
     * @param matches the spots it explains
     * @param unexplained the measured spots it leaves over
     * @param rmsResidual root of the mean squared distance between measured and computed places, in px
     * @param score log-likelihood ratio in nats against chance
     * @param errors standard uncertainties
     * @param halfTurn the orientation half a turn about the zone axis away, if it is as good
     * @param remarks sentences on what the spots do not tell apart
     */
    public Solution(
            Placement placement,
            List<SpotMatch> matches,
            List<MeasuredSpot> unexplained,
            double rmsResidual,
            double score,
            SolutionErrors errors,
            Optional<Orientation> halfTurn,
            List<String> remarks) {
        this(placement, matches, unexplained, rmsResidual, score, errors, halfTurn, remarks, OptionalDouble.empty());
    }

    /**
     * How many of the measured spots it explains.
     *
     * @return explained spots over all measured ones, 0 to 1; 0 without spots
     */
    public double explainedFraction() {
        int all = matches.size() + unexplained.size();
        return all == 0 ? 0 : (double) matches.size() / all;
    }

    /**
     * The camera as a calibration to be kept, with the crystal as its standard: its cell is taken as exact.
     *
     * <p>The ellipse's error is not part of the fit's outcome; it is taken as that of a fit to spots on all sides, whose two
     * axes are each known to √2 of the relative error of their geometric mean, so that the ratio is known to twice it.
     *
     * @param name the user's name for it
     * @param setting the microscope's setting; its voltage must be that of the solution
     * @param date the day
     * @return the calibration, of no image rotation yet
     * @throws IllegalArgumentException if the name is blank or the voltages differ
     */
    public Calibration calibration(String name, MicroscopeSetting setting, LocalDate date) {
        double kilovolts = placement.beam().kilovolts();
        if (setting.kilovolts() != kilovolts) {
            throw new IllegalArgumentException("accelerating voltage: " + setting.kilovolts()
                    + " kV, expected that of the solution, " + kilovolts + " kV");
        }
        Camera camera = placement.camera();
        double ratioError = 2 * errors.constant() / camera.constant();
        double azimuthError = ratioError < Math.PI * (camera.ellipseRatio() - 1)
                ? ratioError / (2 * (camera.ellipseRatio() - 1))
                : Math.PI / 2;
        return new Calibration(
                name,
                setting,
                date,
                placement.crystal().name(),
                new MeasuredValue(camera.constant(), errors.constant()),
                new MeasuredValue(camera.ellipseRatio(), ratioError),
                new MeasuredValue(camera.ellipseAzimuth(), azimuthError),
                camera.mirrored(),
                Optional.empty());
    }

    Solution withScore(double other) {
        return new Solution(placement, matches, unexplained, rmsResidual, other, errors, halfTurn, remarks, ownScore);
    }

    Solution withOwnScore(OptionalDouble other) {
        return new Solution(placement, matches, unexplained, rmsResidual, score, errors, halfTurn, remarks, other);
    }
}
