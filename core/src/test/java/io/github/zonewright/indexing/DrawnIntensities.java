package io.github.zonewright.indexing;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.Reflection;
import io.github.zonewright.crystal.ReflectionTable;
import io.github.zonewright.crystal.StructureFactor;
import io.github.zonewright.crystal.StructureFactors;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.microscope.Beam;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.HashMap;
import java.util.List;
import java.util.Map;
import java.util.Random;
import org.ejml.data.DMatrixRMaj;
import org.ejml.dense.row.factory.DecompositionFactory_DDRM;
import org.ejml.interfaces.decomposition.EigenDecomposition_F64;

/**
 * The tests' own intensities of a foil, written from the formulas of the textbooks: kinematic, two-beam, or many-beam by the
 * eigenvalues of the structure matrix (Bethe), each averaged over a bend. Only the structure factors come from the library.
 */
record DrawnIntensities(Model model, double thickness, double bend, double power, double doubled) {

    enum Model {
        GAUSS,
        SINC2,
        TWO_BEAM,
        MANY_BEAM
    }

    private static final int MOST_BEAMS = 70;

    /** Tilts over a bend, in its standard deviations, with their weights: seven, and forty-nine. */
    private static final double[][] HEXAGON = tilts(1, 1.5);

    private static final double[][] DISC = tilts(8, 0.35);

    /** A reflection near the Ewald sphere: its place in the microscope and its intensity. */
    record Diffracted(Hkl hkl, Vector3 g, double intensity) {}

    static DrawnIntensities random(Random random, double largestBend) {
        Model model = Model.values()[random.nextInt(Model.values().length)];
        double thickness = switch (model) {
            case MANY_BEAM -> 150 + 450 * random.nextDouble();
            case TWO_BEAM -> 50 + 400 * random.nextDouble();
            default -> 20 * Math.exp(2.6 * random.nextDouble());
        };
        double bend = Math.toRadians(0.06 + largestBend * random.nextDouble());
        double power =
                model == Model.MANY_BEAM || random.nextBoolean() ? 1 : Math.max(0.5, 0.4 + 0.4 * random.nextDouble());
        return new DrawnIntensities(model, thickness, bend, power, random.nextInt(4) == 0 ? 0.05 : 0);
    }

    /** Rings of six directions each, normally distributed. */
    private static double[][] tilts(int rings, double step) {
        double[][] all = new double[1 + 6 * rings][];
        all[0] = new double[] {0, 0, 1};
        for (int ring = 1; ring <= rings; ring++) {
            for (int i = 0; i < 6; i++) {
                double r = ring * step;
                double a = Math.PI / 3 * (i + 0.5 * (ring % 2));
                all[6 * ring + i - 5] = new double[] {r * Math.cos(a), r * Math.sin(a), ring * Math.exp(-r * r / 2)};
            }
        }
        return all;
    }

    /** The same in a thinner foil, down to 20 Å: one that leans shows but an arc of few spots where it is thick. */
    DrawnIntensities thinner(double factor) {
        return new DrawnIntensities(model, Math.max(20, thickness * factor), bend, power, doubled);
    }

    /** What is diffracted up to a length of g, strongest first. */
    List<Diffracted> of(Crystal crystal, Beam beam, Rotation orientation, double largest) {
        List<Reflection> near = new ArrayList<>();
        double k = 1 / beam.wavelength();
        for (Reflection r : ReflectionTable.ofLength(crystal, largest).reflections()) {
            Vector3 g = orientation.apply(r.g());
            if (Math.abs(excitation(g, k)) < 0.08 && Math.hypot(g.x(), g.y()) < k) {
                near.add(r);
            }
        }
        near.sort(Comparator.comparing(Reflection::hkl));
        double[] sums = new double[near.size()];
        for (double[] tilt : model == Model.MANY_BEAM ? HEXAGON : DISC) {
            Rotation bent = Rotation.ofVector(new Vector3(bend * tilt[0], bend * tilt[1], 0))
                    .after(orientation);
            double[] now =
                    model == Model.MANY_BEAM ? manyBeam(crystal, beam, bent, near) : single(crystal, beam, bent, near);
            for (int i = 0; i < sums.length; i++) {
                sums[i] += now[i] * tilt[2];
            }
        }
        Map<Hkl, Diffracted> found = new HashMap<>();
        double most = 1e-30;
        for (double sum : sums) {
            most = Math.max(most, sum);
        }
        for (int i = 0; i < sums.length; i++) {
            Reflection r = near.get(i);
            found.put(r.hkl(), new Diffracted(r.hkl(), orientation.apply(r.g()), Math.pow(sums[i] / most, power)));
        }
        if (doubled > 0) {
            addDoubled(crystal, orientation, found, largest);
        }
        return found.values().stream()
                .sorted(Comparator.comparingDouble(Diffracted::intensity)
                        .reversed()
                        .thenComparing(Diffracted::hkl))
                .toList();
    }

    /** Beams that are diffracted twice: a share of the product of two intensities at the sum of two reflections. */
    private void addDoubled(Crystal crystal, Rotation orientation, Map<Hkl, Diffracted> found, double largest) {
        List<Diffracted> strong = found.values().stream()
                .filter(d -> d.intensity > 0.05)
                .sorted(Comparator.comparing(Diffracted::hkl))
                .toList();
        for (Diffracted a : strong) {
            for (Diffracted b : strong) {
                Hkl sum = new Hkl(a.hkl.h() + b.hkl.h(), a.hkl.k() + b.hkl.k(), a.hkl.l() + b.hkl.l());
                Vector3 g = orientation.apply(crystal.lattice().reciprocal().vector(sum));
                if (!sum.isZero() && g.norm() < largest) {
                    double more = doubled * a.intensity * b.intensity;
                    found.merge(
                            sum,
                            new Diffracted(sum, g, more),
                            (p, q) -> new Diffracted(sum, g, p.intensity + q.intensity));
                }
            }
        }
    }

    private static double excitation(Vector3 g, double k) {
        return g.z() - (k - Math.sqrt(Math.max(0, k * k - g.x() * g.x() - g.y() * g.y())));
    }

    private double[] single(Crystal crystal, Beam beam, Rotation orientation, List<Reflection> near) {
        double factor =
                beam.wavelength() * beam.gamma() / (Math.PI * crystal.lattice().volume());
        double[] all = new double[near.size()];
        for (int i = 0; i < all.length; i++) {
            double s = excitation(orientation.apply(near.get(i).g()), 1 / beam.wavelength());
            double inverse = factor * near.get(i).amplitude();
            double width = 0.45 / thickness;
            all[i] = switch (model) {
                case GAUSS -> inverse * inverse * Math.exp(-s * s / (2 * width * width));
                case SINC2 -> inverse * inverse * Math.pow(sinc(Math.PI * thickness * s), 2);
                default -> {
                    double effective = Math.hypot(s, inverse);
                    yield Math.pow(inverse * Math.sin(Math.PI * thickness * effective) / effective, 2);
                }
            };
        }
        return all;
    }

    private static double sinc(double x) {
        return Math.abs(x) < 1e-6 ? 1 : Math.sin(x) / x;
    }

    /** The strongest beams by |F|/(1 + |s|·100 Å), together; the rest kinematically. */
    private double[] manyBeam(Crystal crystal, Beam beam, Rotation orientation, List<Reflection> near) {
        double k = 1 / beam.wavelength();
        double factor = beam.gamma() / (Math.PI * crystal.lattice().volume());
        double[] weight = new double[near.size()];
        List<Integer> order = new ArrayList<>();
        for (int i = 0; i < weight.length; i++) {
            double s = excitation(orientation.apply(near.get(i).g()), k);
            weight[i] = near.get(i).amplitude() / (1 + 300 * Math.abs(s));
            order.add(i);
        }
        order.sort(Comparator.comparingDouble((Integer i) -> -weight[i]));
        int n = Math.min(MOST_BEAMS, order.size()) + 1;
        StructureFactors factors = StructureFactors.of(crystal);
        // Hermitian n × n as a real symmetric 2n × 2n matrix; half the phase per unit of thickness, in 1/Å.
        DMatrixRMaj matrix = new DMatrixRMaj(2 * n, 2 * n);
        for (int i = 0; i < n; i++) {
            Hkl gi = i == 0 ? new Hkl(0, 0, 0) : near.get(order.get(i - 1)).hkl();
            for (int j = 0; j <= i; j++) {
                double re;
                double im = 0;
                if (i == j) {
                    re = i == 0
                            ? 0
                            : 2
                                    * k
                                    * excitation(
                                            orientation.apply(
                                                    near.get(order.get(i - 1)).g()),
                                            k);
                } else {
                    Hkl gj = j == 0
                            ? new Hkl(0, 0, 0)
                            : near.get(order.get(j - 1)).hkl();
                    StructureFactor f = factors.at(new Hkl(gi.h() - gj.h(), gi.k() - gj.k(), gi.l() - gj.l()));
                    re = factor * f.re();
                    im = factor * f.im();
                }
                put(matrix, n, i, j, re, im);
                put(matrix, n, j, i, re, -im);
            }
        }
        EigenDecomposition_F64<DMatrixRMaj> eigen = DecompositionFactory_DDRM.eig(2 * n, true, true);
        eigen.decompose(matrix);
        double[] re = new double[n];
        double[] im = new double[n];
        for (int j = 0; j < 2 * n; j++) {
            DMatrixRMaj v = eigen.getEigenVector(j);
            double phase = Math.PI * thickness * eigen.getEigenvalue(j).getReal() / k;
            double c = Math.cos(phase) * v.get(0);
            double s = Math.sin(phase) * v.get(0);
            for (int i = 0; i < n; i++) {
                re[i] += c * v.get(i) - s * v.get(n + i);
                im[i] += s * v.get(i) + c * v.get(n + i);
            }
        }
        double[] all = single(crystal, beam, orientation, near);
        for (int i = 1; i < n; i++) {
            all[order.get(i - 1)] = re[i] * re[i] + im[i] * im[i];
        }
        return all;
    }

    private static void put(DMatrixRMaj m, int n, int i, int j, double re, double im) {
        m.set(i, j, re);
        m.set(n + i, n + j, re);
        m.set(i, n + j, -im);
        m.set(n + i, j, im);
    }
}
