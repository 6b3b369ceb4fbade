package io.github.zonewright.indexing;

import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotResponse;
import java.util.ArrayList;
import java.util.Comparator;
import java.util.IdentityHashMap;
import java.util.List;
import java.util.Map;

/**
 * What the image shows at every node of a placed net that could be seen: the intensity of a matched spot, the filter's
 * answer where none was found (forced photometry), or the limit below which a spot would not have shown.
 */
final class NodeIntensities {

    private static final double DETECTION = 3;
    private static final double PHOTOMETRY_SCATTER = 1.2;

    /** One visible node. The level is ln intensity when detected, else ln of the limit; the variance is that of
     * the measurement. */
    record Entry(ZoneNet.Node node, boolean detected, double level, double variance) {}

    private final List<Entry> entries;

    NodeIntensities(List<Entry> entries) {
        this.entries = entries;
    }

    static NodeIntensities read(
            MeasuredPattern pattern, SpotCloud cloud, PositionScore score, ZoneNet net, NetFit.Fit fit) {
        Map<ZoneNet.Node, Integer> matches = new IdentityHashMap<>();
        for (int i = 0; i < cloud.size(); i++) {
            if (score.isMatched(fit, i)) {
                matches.put(fit.nodes()[i], i);
            }
        }
        NetMap map = NetMap.of(fit.pose());
        double margin = 1.5 * pattern.spotSigma();
        List<Entry> entries = new ArrayList<>();
        for (ZoneNet.Node node : net.nodes()) {
            Integer match = matches.get(node);
            double f = net.flatness(node);
            PixelPoint place = match != null
                    ? cloud.spot(match).position()
                    : cloud.toImage(map.x(node.x() * f, node.y() * f), map.y(node.x() * f, node.y() * f));
            if (match == null && !isVisible(pattern, place, margin)) {
                continue;
            }
            SpotResponse response = pattern.measureAt(place);
            double noise = Math.max(response.noise(), 1e-12);
            double signal = match != null ? cloud.spot(match).intensity() : response.signal();
            boolean detected = match != null || signal > DETECTION * noise;
            if (!detected && !node.allowed()) {
                continue; // double diffraction may light it, and is not missed where it does not
            }
            double level = detected
                    ? Math.log(Math.max(signal, noise))
                    : Math.log((Math.max(0, Math.min(DETECTION, signal / noise)) + 1.7) * noise);
            double photometry = PHOTOMETRY_SCATTER * noise / Math.max(signal, noise);
            double saturation = match != null && cloud.spot(match).saturated() ? 0.5 : 0;
            double variance = photometry * photometry + saturation * saturation;
            entries.add(new Entry(node, detected, level, detected ? variance : 0));
        }
        entries.sort(Comparator.comparing((Entry e) -> !e.detected)
                .thenComparingInt(e -> e.node.family())
                .thenComparing(e -> e.node.hkl()));
        return new NodeIntensities(List.copyOf(entries));
    }

    private static boolean isVisible(MeasuredPattern pattern, PixelPoint p, double margin) {
        return p.x() >= margin
                && p.y() >= margin
                && p.x() <= pattern.width() - margin
                && p.y() <= pattern.height() - margin
                && !pattern.isHidden(p);
    }

    /** The visible nodes: detected ones first, one family after the other. */
    List<Entry> entries() {
        return entries;
    }
}
