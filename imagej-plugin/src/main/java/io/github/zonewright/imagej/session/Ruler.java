package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.calibration.Spacing;
import io.github.zonewright.calibration.SpacingRuler;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.imagej.bridge.NetTable;
import io.github.zonewright.imagej.overlay.RulerLine;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import io.github.zonewright.spots.SpotNet;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * The library's ruler with what is known of one image: its centre, and the scale where there is one. Without a scale it reads
 * pixels, ratios and angles.
 *
 * @param centre the centre, if any is known
 * @param scale the scale, if it is known
 */
public record Ruler(Optional<PatternCentre> centre, Optional<Scale> scale) {
    private static final double PERCENT = 0.01;

    /** Stands for the constant where it is not known: so long that the detector is flat. */
    private static final double FAR = 1e8;

    /**
     * What the scale is.
     *
     * @param beam the beam
     * @param constant camera constant in px·Å
     * @param tolerance how far it may be off, as a part of it
     * @param mirrored whether the image is mirrored
     */
    public record Scale(Beam beam, double constant, double tolerance, boolean mirrored) {
        /** Standard uncertainty in px·Å when every value within the tolerance is as likely (GUM 4.3.7). */
        double error() {
            return constant * tolerance / Math.sqrt(3);
        }
    }

    /**
     * A reading.
     *
     * @param point where the ruler was laid
     * @param spacing what it read; its d means nothing without a scale
     * @param relation ratio and angle to the reading before, if there is one
     */
    public record Reading(RulerPoint point, Spacing spacing, Optional<Spacing.Relation> relation) {}

    /**
     * The ruler of an image's current slice.
     *
     * @param image the image
     * @param sitting what is known of it
     * @return the ruler
     */
    public static Ruler of(ImagePlus image, Sitting sitting) {
        Optional<PatternCentre> centre = sitting.measured()
                .flatMap(MeasuredPattern::centre)
                .or(() -> sitting.measurement().net().flatMap(SpotNet::refinedCentre));
        return new Ruler(centre, scale(image));
    }

    /** As said for the image, or else as its own calibration says. */
    private static Optional<Scale> scale(ImagePlus image) {
        Instrument said = Instrument.of(image).orElseGet(() -> Instrument.last().withKind(ScaleKind.IMAGE));
        try {
            return Optional.of(new Scale(
                    said.beam(), said.cameraConstant(image), PERCENT * said.tolerancePercent(), said.mirrored()));
        } catch (IllegalArgumentException e) {
            return Optional.empty();
        }
    }

    /**
     * With another camera constant, taken to be exact.
     *
     * @param constant camera constant in px·Å; empty to leave the scale as it is
     * @return the ruler
     */
    public Ruler withConstant(OptionalDouble constant) {
        if (constant.isEmpty()) {
            return this;
        }
        Scale known = scale.orElseGet(() -> new Scale(Instrument.last().beam(), 1, 0, false));
        return new Ruler(centre, Optional.of(new Scale(known.beam(), constant.getAsDouble(), 0, known.mirrored())));
    }

    /**
     * Reads at a place.
     *
     * @param point the place
     * @return the spacing
     * @throws IllegalArgumentException if there is no centre to count from, or the place is the centre
     */
    public Spacing read(RulerPoint point) {
        if (point.opposite().isPresent()) {
            PixelPoint other = point.opposite().get();
            return ruler(point.place().midpoint(other), 0).pair(point.place(), other, point.error(), point.order());
        }
        PatternCentre known = centre.orElseThrow(() ->
                new IllegalArgumentException("the centre is not known: set it, or read a pair of spots g and −g"));
        return ruler(known.position(), known.error()).spot(point.place(), point.error(), point.order());
    }

    /**
     * The spacing of a vector of the net.
     *
     * @param origin where it begins
     * @param end where it ends
     * @param error standard uncertainty of each component in px
     * @return the spacing
     */
    public Spacing vector(PixelPoint origin, PixelPoint end, double error) {
        return ruler(origin, 0).spot(end, error, 1);
    }

    /**
     * Reads at all places of a list, each with its relation to the one before.
     *
     * @param points the places; those that can't be read are left out
     * @return the readings
     */
    public List<Reading> readings(List<RulerPoint> points) {
        List<Reading> read = new ArrayList<>();
        Optional<Spacing> before = Optional.empty();
        for (RulerPoint point : points) {
            if (point.opposite().isEmpty() && centre.isEmpty()) {
                continue;
            }
            Spacing spacing = read(point);
            read.add(new Reading(point, spacing, before.map(spacing::to)));
            before = Optional.of(spacing);
        }
        return read;
    }

    /**
     * The spacings of spots for a table.
     *
     * @return how they are read; empty where scale or centre is not known
     */
    public Optional<NetTable.Spacings> spacings() {
        if (scale.isEmpty() || centre.isEmpty()) {
            return Optional.empty();
        }
        LengthUnit unit = LengthUnit.last();
        PixelPoint origin = centre.get().position();
        return Optional.of(new NetTable.Spacings(
                unit.label(),
                spot -> spot.position().equals(origin)
                        ? Optional.empty()
                        : Optional.of(read(new RulerPoint(spot.position(), Optional.empty(), spot.positionError(), 1))
                                .d()
                                .times(unit.of(1)))));
    }

    /**
     * What a reading says in short.
     *
     * @param spacing the reading
     * @return d where there is a scale, else the length in px
     */
    public String text(Spacing spacing) {
        return scale.isPresent() ? LengthUnit.last().text(spacing.d()) : Figures.of(spacing.length(), " px");
    }

    List<RulerLine> lines(List<RulerPoint> points) {
        return readings(points).stream()
                .map(r -> new RulerLine(
                        r.point()
                                .opposite()
                                .orElseGet(() -> centre.orElseThrow().position()),
                        r.point().place(),
                        (r.point().opposite().isPresent() ? 2 : 1) * r.point().order(),
                        text(r.spacing())))
                .toList();
    }

    private SpacingRuler ruler(PixelPoint origin, double error) {
        Scale known = scale.orElseGet(() -> new Scale(Beam.ofKilovolts(200), FAR, 0, false));
        return SpacingRuler.of(
                Camera.of(origin, known.constant(), known.mirrored()), known.error(), error, known.beam());
    }
}
