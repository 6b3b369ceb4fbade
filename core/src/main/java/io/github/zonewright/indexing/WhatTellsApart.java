package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.Discrimination.Kind;
import io.github.zonewright.indexing.Discrimination.Sight;
import io.github.zonewright.indexing.Discrimination.TellingSpot;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.LatticeRotation;
import io.github.zonewright.orientation.Misorientation;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.IntensityModel;
import io.github.zonewright.pattern.PatternSimulator;
import io.github.zonewright.pattern.PlacedSpot;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.pattern.SpotPattern;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotResponse;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;
import java.util.Optional;
import java.util.OptionalDouble;

/**
 * Finds out what tells two answers apart that explain the same spots: why they are alike, a spot to look for on the image, and
 * the smallest tilt to a zone axis where they expect different patterns.
 *
 * <p>Strengths are those of single scattering, smoothed over the excitation error; double diffraction, which lights up
 * extinct reflections, and thickness are left out, so a spot that is there proves less than a pattern after a tilt.
 *
 * <p>Caution: a tilt is told in the microscope frame. The limits of the holder, the sense and the crossing of its axes, its
 * backlash and the gap of the pole piece are not known here; nothing says that a tilt can be made or made safely. The
 * angle is no better than the lean of the answers is.
 */
public final class WhatTellsApart {

    /** The farthest tilt that is looked at: 30°, as far as many holders go. */
    public static final double LARGEST_TILT = Math.toRadians(30);

    /** A smaller tilt only undoes the lean, which differs between answers by its error. */
    private static final double LEAST_TILT = Math.toRadians(2);

    private static final int LARGEST_INDEX = 4;

    /** Two patterns that differ by this much of their intensity differ plainly. */
    private static final double PLAIN = 0.4;

    private static final int LEAST_SPOTS = 6;
    private static final double LARGEST_G = 1.3;
    private static final double THICKNESS = 100;
    private static final double HALF_WIDTH = 0.008;

    /** A spot is telling when it is this strong, and this much stronger than what the other expects. */
    private static final double STRONG = 0.08;

    private static final double STRONGER = 5;
    private static final int MOST_SPOTS = 6;
    private static final double SEEN = 4;

    /** How far off the edge of the image spots are still told, as a share of its side. */
    private static final double BEYOND = 0.3;

    /** Families whose |F| differ by less than this share of the strongest are equally strong. */
    private static final double SAME_STRENGTH = 0.02;

    private static final double HALF_TURN = Math.toRadians(2);

    private final MeasuredPattern pattern;
    private final Placement first;
    private final Placement second;
    private final Misorientation misorientation;
    private final PatternSimulator ofFirst;
    private final PatternSimulator ofSecond;

    private WhatTellsApart(MeasuredPattern pattern, Placement first, Placement second) {
        this.pattern = pattern;
        this.first = first;
        this.second = second;
        this.misorientation = Misorientation.between(
                HalfTurn.lattice(first, first.orientation()), HalfTurn.lattice(second, second.orientation()));
        this.ofFirst = simulator(first);
        this.ofSecond = simulator(second);
    }

    /**
     * Compares two answers.
     *
     * @param pattern the measured spots, for what the image shows and hides
     * @param first the first answer
     * @param second the other answer, of the same image and so of the same beam
     * @return what tells them apart
     */
    public static Discrimination between(MeasuredPattern pattern, Placement first, Placement second) {
        return new WhatTellsApart(pattern, first, second).compare();
    }

    /**
     * The answer half a turn about the zone axis away, for a solution that leaves it open.
     *
     * @param placement the answer
     * @return the same zone, turned by 180° in the image and leaning the same way
     */
    public static Placement halfTurned(Placement placement) {
        ZoneSetting s = placement.setting();
        return placement.withSetting(new ZoneSetting(
                s.zone(),
                s.reference(),
                Math.IEEEremainder(s.rotation() + Math.PI, 2 * Math.PI),
                s.leanX(),
                s.leanY()));
    }

    private PatternSimulator simulator(Placement p) {
        double reach = Math.min(LARGEST_G, p.largestG(pattern.width(), pattern.height()) * (1 + BEYOND));
        return PatternSimulator.of(
                        p.crystal(), p.beam(), Math.min(reach, 0.9 / p.beam().wavelength()))
                .withModel(new IntensityModel.Smoothed(THICKNESS, HALF_WIDTH));
    }

    private Discrimination compare() {
        return new Discrimination(kind(), misorientation, tellingSpots(), tilt());
    }

    private Kind kind() {
        if (!first.crystal().equals(second.crystal())) {
            return Kind.TWO_CRYSTALS;
        }
        Crystal crystal = first.crystal();
        OptionalDouble strain =
                LatticeRotation.strain(misorientation.rotation(), crystal.lattice(), crystal.spaceGroup());
        if (strain.isPresent()) {
            return strain.getAsDouble() > 1e-3
                    ? Kind.PSEUDO_MEROHEDRAL
                    : sameStrengths() ? Kind.INDISTINGUISHABLE : Kind.MEROHEDRAL;
        }
        Optional<Misorientation> turned = HalfTurn.of(second)
                .map(o -> Misorientation.between(misorientation.first(), HalfTurn.lattice(second, o)));
        if (turned.filter(m -> m.angle() < HALF_TURN).isPresent()) {
            return Kind.HALF_TURN;
        }
        boolean ofLattice = turned.filter(
                        m -> LatticeRotation.strain(m.rotation(), crystal.lattice(), crystal.spaceGroup())
                                .isPresent())
                .isPresent();
        return ofLattice ? Kind.MEROHEDRAL_AND_HALF_TURN : Kind.ACCIDENTAL;
    }

    /** Whether the turn of the lattice carries every reflection to one that is as strong. */
    private boolean sameStrengths() {
        ReflectionStrengths strengths = new ReflectionStrengths(first.crystal(), first.beam(), LARGEST_G);
        double strongest = strengths.reflections().stream()
                .mapToDouble(Reflection::amplitude)
                .max()
                .orElse(0);
        Rotation back = misorientation.rotation().inverse();
        return strengths.reflections().stream().allMatch(r -> {
            Vector3 h = strengths.reciprocal().indices(back.apply(r.g()));
            Hkl mate = new Hkl((int) Math.rint(h.x()), (int) Math.rint(h.y()), (int) Math.rint(h.z()));
            return Math.abs(strengths.amplitude(mate) - r.amplitude()) < SAME_STRENGTH * strongest;
        });
    }

    private List<TellingSpot> tellingSpots() {
        List<PlacedSpot> a = placed(ofFirst, first);
        List<PlacedSpot> b = placed(ofSecond, second);
        List<TellingSpot> found = new ArrayList<>(telling(a, b, true));
        found.addAll(telling(b, a, false));
        found.sort(Comparator.comparing((TellingSpot s) -> s.sight() == Sight.HIDDEN || s.sight() == Sight.OUTSIDE)
                .thenComparing(Comparator.comparingDouble(TellingSpot::strength).reversed())
                .thenComparing(TellingSpot::hkl));
        return found.subList(0, Math.min(MOST_SPOTS, found.size()));
    }

    private static List<PlacedSpot> placed(PatternSimulator simulator, Placement p) {
        return simulator.simulate(p.orientation()).on(p.camera());
    }

    private List<TellingSpot> telling(List<PlacedSpot> own, List<PlacedSpot> other, boolean isFirst) {
        double strongest = strongest(own);
        double otherStrongest = strongest(other);
        double near = Math.max(3, 2 * pattern.spotSigma());
        List<TellingSpot> found = new ArrayList<>();
        for (PlacedSpot s : own) {
            double strength = s.spot().intensity() / strongest;
            if (strength < STRONG || isFarOutside(s.position())) {
                continue;
            }
            double there = other.stream()
                    .filter(o -> o.position().distanceTo(s.position()) < near)
                    .mapToDouble(o -> o.spot().intensity() / otherStrongest)
                    .max()
                    .orElse(0);
            if (strength > STRONGER * there) {
                found.add(new TellingSpot(s.spot().hkl(), isFirst, s.position(), strength, there, sight(s.position())));
            }
        }
        return found;
    }

    private static double strongest(List<PlacedSpot> spots) {
        return spots.stream().mapToDouble(s -> s.spot().intensity()).max().orElse(1);
    }

    private boolean isFarOutside(PixelPoint p) {
        double w = BEYOND * pattern.width();
        double h = BEYOND * pattern.height();
        return p.x() < -w || p.y() < -h || p.x() > pattern.width() + w || p.y() > pattern.height() + h;
    }

    private Sight sight(PixelPoint p) {
        if (p.x() < 0 || p.y() < 0 || p.x() >= pattern.width() || p.y() >= pattern.height()) {
            return Sight.OUTSIDE;
        }
        if (pattern.isHidden(p)) {
            return Sight.HIDDEN;
        }
        SpotResponse response = pattern.measureAt(p);
        return response.signal() > SEEN * response.noise() ? Sight.SEEN : Sight.NOT_SEEN;
    }

    /** The smallest tilt that brings a zone axis of the first answer to the beam where the patterns differ plainly. */
    private Optional<Discrimination.Tilt> tilt() {
        record Way(Uvw zone, Vector3 axis, double angle) {}
        Rotation here = first.orientation().rotation();
        List<Way> ways = new ArrayList<>();
        for (Uvw zone : Uvw.upTo(LARGEST_INDEX)) {
            Vector3 axis = here.apply(first.crystal().lattice().vector(zone));
            double angle = axis.angleTo(Vector3.Z);
            if (angle >= LEAST_TILT && angle <= LARGEST_TILT) {
                ways.add(new Way(zone, axis, angle));
            }
        }
        ways.sort(Comparator.comparingDouble(Way::angle).thenComparing(Way::zone));
        for (Way way : ways) {
            Rotation tilt = Rotation.between(way.axis, Vector3.Z);
            SpotPattern a = ofFirst.simulate(turned(first, tilt));
            SpotPattern b = ofSecond.simulate(turned(second, tilt));
            double difference = PatternDifference.of(a, b);
            if (a.spots().size() >= LEAST_SPOTS && difference > PLAIN) {
                Vector3 rotation = tilt.axis().times(tilt.angle());
                Uvw other = b.orientation().nearestZone(second.crystal().lattice(), LARGEST_INDEX);
                return Optional.of(new Discrimination.Tilt(
                        new Vector3(rotation.x(), rotation.y(), 0), way.zone, other, a, b, difference));
            }
        }
        return Optional.empty();
    }

    private static Orientation turned(Placement p, Rotation tilt) {
        return new Orientation(tilt.after(p.orientation().rotation()));
    }
}
