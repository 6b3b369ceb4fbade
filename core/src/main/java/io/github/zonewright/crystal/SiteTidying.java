package io.github.zonewright.crystal;

import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.symmetry.SiteImage;
import io.github.zonewright.symmetry.SpaceGroup;
import java.util.ArrayList;
import java.util.HashMap;
import java.util.List;
import java.util.Locale;
import java.util.Map;

/** Puts truncated special positions right and merges sites that symmetry makes one, with a notice of each. */
final class SiteTidying {

    private static final double MOVED = 1e-9;
    private static final double FULL = 1.001;
    private static final int MOST_ATOMS = 200_000;
    private static final int BINS = 200;

    private final SpaceGroup group;
    private final List<String> notices;
    private final List<AtomSite> kept = new ArrayList<>();
    private final Map<Long, List<Integer>> bins = new HashMap<>();

    private SiteTidying(SpaceGroup group, List<String> notices) {
        this.group = group;
        this.notices = notices;
    }

    static List<AtomSite> tidy(List<AtomSite> sites, SpaceGroup group, List<String> notices) {
        if ((long) sites.size() * group.order() > MOST_ATOMS) {
            throw new IllegalArgumentException(sites.size() + " sites with " + group.order()
                    + " operations, expected a product of at most " + MOST_ATOMS);
        }
        SiteTidying tidying = new SiteTidying(group, notices);
        List<AtomSite> snapped = tidying.snap(sites);
        snapped.forEach(tidying::keepOrMerge);
        return tidying.kept;
    }

    private List<AtomSite> snap(List<AtomSite> sites) {
        List<String> moved = new ArrayList<>();
        double furthest = 0;
        List<AtomSite> snapped = new ArrayList<>();
        for (AtomSite site : sites) {
            Vector3 target = group.snap(site.position(), Crystal.SAME_SITE);
            double distance = target.minus(site.position()).norm();
            snapped.add(new AtomSite(site.label(), site.element(), target, site.occupancy(), site.displacement()));
            if (distance > MOVED) {
                moved.add(site.label());
                furthest = Math.max(furthest, distance);
            }
        }
        if (!moved.isEmpty()) {
            notices.add(String.format(
                    Locale.ROOT,
                    "Truncated coordinates were put onto special positions (by at most %.1g of a cell edge): %s.",
                    furthest,
                    shortList(moved)));
        }
        return snapped;
    }

    private void keepOrMerge(AtomSite site) {
        List<AtomSite> same = new ArrayList<>();
        for (SiteImage image : group.orbit(site.position(), Crystal.SAME_SITE)) {
            same.addAll(at(image.position()));
        }
        double share = site.occupancy()
                + same.stream().mapToDouble(AtomSite::occupancy).sum();
        for (AtomSite other : same) {
            if (share > FULL && other.element().equals(site.element())) {
                notices.add(
                        "Site " + site.label() + " is " + other.label() + " again by symmetry and was counted once.");
                return;
            }
        }
        if (share > FULL) {
            notices.add(String.format(
                    Locale.ROOT,
                    "Site %s shares its place with %s; the occupancies add up to %.3f and were left so.",
                    site.label(),
                    same.get(0).label(),
                    share));
        }
        int[] bin = bin(site.position());
        bins.computeIfAbsent(key(bin[0], bin[1], bin[2]), k -> new ArrayList<>())
                .add(kept.size());
        kept.add(site);
    }

    private List<AtomSite> at(Vector3 position) {
        List<AtomSite> found = new ArrayList<>();
        int[] bin = bin(position);
        for (int i = -1; i <= 1; i++) {
            for (int j = -1; j <= 1; j++) {
                for (int k = -1; k <= 1; k++) {
                    for (int index : bins.getOrDefault(key(bin[0] + i, bin[1] + j, bin[2] + k), List.of())) {
                        Vector3 d = kept.get(index).position().minus(position);
                        if (near(d.x()) && near(d.y()) && near(d.z())) {
                            found.add(kept.get(index));
                        }
                    }
                }
            }
        }
        return found;
    }

    private static boolean near(double difference) {
        return Math.abs(difference - Math.rint(difference)) <= Crystal.SAME_SITE;
    }

    private static int[] bin(Vector3 p) {
        return new int[] {bin(p.x()), bin(p.y()), bin(p.z())};
    }

    private static int bin(double x) {
        return (int) Math.floor((x - Math.floor(x)) * BINS);
    }

    private static long key(int i, int j, int k) {
        return (Math.floorMod(i, BINS) * (long) BINS + Math.floorMod(j, BINS)) * BINS + Math.floorMod(k, BINS);
    }

    private static String shortList(List<String> names) {
        int most = 8;
        return names.size() <= most
                ? String.join(", ", names)
                : String.join(", ", names.subList(0, most)) + " and " + (names.size() - most) + " more";
    }
}
