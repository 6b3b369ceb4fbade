package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.geometry.Matrix3;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.orientation.Orientation;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.List;

/**
 * Computes spot patterns: which reciprocal-lattice points come close to the exact Ewald sphere, where their spots lie and
 * how strong they are.
 *
 * <p>A spot sits where the line through the reciprocal-lattice point along the foil normal meets the sphere; along it the
 * excitation error is counted. Layers of either sign are enumerated; reflections that the space group or the special
 * positions of the atoms forbid never appear.
 * Instances are immutable and may be shared between threads; the reflections of the crystal are worked out once.
 *
 * <p>Known limits: single scattering only; no double diffraction, no absorption, no diffuse scattering.
 */
public final class PatternSimulator {

    /** Thickness assumed where the caller gives none: 500 Å, a usual foil. */
    public static final double DEFAULT_THICKNESS = 500;

    /** Largest excitation error shown where the caller gives none, in 1/Å. */
    public static final double DEFAULT_LARGEST_EXCITATION = 0.02;

    /** Amplitudes below this part of the strongest are zero but for rounding, such as that of 222 of silicon. */
    private static final double ROUNDING = 1e-9;

    private final Crystal crystal;
    private final Beam beam;
    private final List<Reflection> reflections;
    private final double largestG;
    private final double largestExcitation;
    private final IntensityModel model;
    private final Vector3 foilNormal;

    private PatternSimulator(
            Crystal crystal,
            Beam beam,
            List<Reflection> reflections,
            double largestG,
            double largestExcitation,
            IntensityModel model,
            Vector3 foilNormal) {
        this.crystal = crystal;
        this.beam = beam;
        this.reflections = reflections;
        this.largestG = largestG;
        this.largestExcitation = largestExcitation;
        this.model = model;
        this.foilNormal = foilNormal;
    }

    /**
     * A simulator with the default thickness, kinematic intensities, and the foil across the beam.
     *
     * @param crystal the crystal
     * @param beam the beam
     * @param largestG the largest |g| in 1/Å that is to be seen
     * @return the simulator
     * @throws IllegalArgumentException if largestG is not above 0 and below 1/λ
     */
    public static PatternSimulator of(Crystal crystal, Beam beam, double largestG) {
        if (!(largestG > 0 && largestG < 1 / beam.wavelength())) {
            throw new IllegalArgumentException("largest scattering vector: " + largestG + " 1/Å, expected above 0 and"
                    + " below 1/λ = " + 1 / beam.wavelength() + " 1/Å");
        }
        return new PatternSimulator(
                crystal,
                beam,
                reach(crystal, beam, largestG, DEFAULT_LARGEST_EXCITATION),
                largestG,
                DEFAULT_LARGEST_EXCITATION,
                new IntensityModel.Kinematic(DEFAULT_THICKNESS),
                Vector3.Z);
    }

    /**
     * The same with another intensity model.
     *
     * @param other the model
     * @return the changed simulator
     */
    public PatternSimulator withModel(IntensityModel other) {
        return new PatternSimulator(crystal, beam, reflections, largestG, largestExcitation, other, foilNormal);
    }

    /**
     * The same with another bound on the excitation error.
     *
     * @param other the largest |s| of a spot in 1/Å
     * @return the changed simulator
     * @throws IllegalArgumentException if it is not above 0 and at most 1 1/Å
     */
    public PatternSimulator withLargestExcitation(double other) {
        if (!(other > 0 && other <= 1)) {
            throw new IllegalArgumentException(
                    "largest excitation error: " + other + " 1/Å, expected above 0 and at most 1 1/Å");
        }
        List<Reflection> table = other <= largestExcitation ? reflections : reach(crystal, beam, largestG, other);
        return new PatternSimulator(crystal, beam, table, largestG, other, model, foilNormal);
    }

    /**
     * The same with a tilted foil.
     *
     * @param normal normal of the foil in the microscope frame, less than 80° from Z or −Z
     * @return the changed simulator
     * @throws IllegalArgumentException if the foil stands too steeply
     */
    public PatternSimulator withFoilNormal(Vector3 normal) {
        Vector3 n = normal.normalize();
        if (Math.abs(n.z()) < Math.cos(Math.toRadians(80))) {
            throw new IllegalArgumentException("foil normal " + normal + ": "
                    + Math.toDegrees(Math.acos(Math.abs(n.z()))) + "° from the beam, expected below 80°");
        }
        Vector3 up = n.z() > 0 ? n : n.negate();
        return new PatternSimulator(crystal, beam, reflections, largestG, largestExcitation, model, up);
    }

    /**
     * The same for orientations near one another, as while a crystal is tilted by hand: without the reflections that none of
     * them brings to the Ewald sphere, it takes a fraction of the time.
     *
     * @param source the direction in the crystal that points to the electron source
     * @param angle how far that direction may be from the one of the orientations asked for, in radians
     * @return the simulator; its patterns are the same as long as the directions lie within the angle. With a tilted foil, this
     */
    public PatternSimulator near(Vector3 source, double angle) {
        if (foilNormal != Vector3.Z) {
            return this;
        }
        Vector3 up = source.normalize();
        double k = 1 / beam.wavelength();
        List<Reflection> kept = reflections.stream()
                .filter(r -> {
                    double z = r.g().dot(up);
                    double across = r.g().dot(r.g()) - z * z;
                    double off = Math.abs(z - (k - Math.sqrt(k * k - across)));
                    return !(off > largestExcitation + 1.1 * angle * r.g().norm());
                })
                .toList();
        return new PatternSimulator(crystal, beam, kept, largestG, largestExcitation, model, foilNormal);
    }

    /**
     * The pattern of an orientation.
     *
     * @param orientation the crystal's orientation
     * @return the pattern, strongest spots first
     */
    public SpotPattern simulate(Orientation orientation) {
        Matrix3 r = orientation.rotation().matrix();
        double k = 1 / beam.wavelength();
        double extinctionFactor = Math.PI * crystal.lattice().volume() / (beam.wavelength() * beam.gamma());
        List<PredictedSpot> spots = new ArrayList<>();
        for (Reflection reflection : reflections) {
            Vector3 g = r.times(reflection.g());
            double along = alongNormal(g, k);
            if (!(Math.abs(along) <= largestExcitation)) {
                continue;
            }
            Vector2 place = new Vector2(g.x() - along * foilNormal.x(), g.y() - along * foilNormal.y());
            if (place.dot(place) > largestG * largestG) {
                continue;
            }
            double sine = reflection.g().norm() * beam.wavelength() / 2;
            double cosine = Math.sqrt(Math.max(0, 1 - sine * sine));
            double amplitude = reflection.amplitude();
            double intensity = model.intensity(along, extinctionFactor * cosine / amplitude);
            spots.add(new PredictedSpot(reflection.hkl(), place, along, amplitude, intensity));
        }
        spots.sort(Comparator.comparingDouble(PredictedSpot::intensity)
                .reversed()
                .thenComparing(PredictedSpot::hkl, Comparator.<Hkl>naturalOrder()));
        return new SpotPattern(crystal, orientation, beam, spots);
    }

    /**
     * All reflections other than zero that can come within the excitation error of the part of the sphere that is seen: the spot at
     * largestG lies on the sphere at the depth G²/(k + √(k² − G²)), which for slow electrons is no small thing.
     */
    private static List<Reflection> reach(Crystal crystal, Beam beam, double largestG, double largestExcitation) {
        double k = 1 / beam.wavelength();
        double depth = largestG * largestG / (k + Math.sqrt(k * k - largestG * largestG));
        List<Reflection> all = ReflectionTable.ofLength(crystal, Math.hypot(largestG, depth) + largestExcitation)
                .reflections();
        double strongest = all.stream().mapToDouble(Reflection::amplitude).max().orElse(0);
        return all.stream().filter(r -> r.amplitude() > ROUNDING * strongest).toList();
    }

    /** The excitation error along the foil normal: how far above the sphere, towards the source, g lies. */
    private double alongNormal(Vector3 g, double k) {
        double px = g.x();
        double py = g.y();
        double pz = g.z() - k;
        double pn = px * foilNormal.x() + py * foilNormal.y() + pz * foilNormal.z();
        double c = px * px + py * py + g.z() * (g.z() - 2 * k);
        double root = pn * pn - c;
        return root < 0 ? Double.NaN : pn >= 0 ? Double.NaN : c / (pn - Math.sqrt(root));
    }
}
