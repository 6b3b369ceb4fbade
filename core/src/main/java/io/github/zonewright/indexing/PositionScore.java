package io.github.zonewright.indexing;

import java.util.Arrays;

/**
 * How much better a net explains where the spots lie than chance does, in nats: a matched spot earns the logarithm of its
 * likelihood about its node over the local density of spots; an unmatched one costs the more, the brighter it is.
 */
final class PositionScore {

    private static final double MATCHED_SHARE = Math.log(0.8);
    private static final double UNMATCHED_SHARE = Math.log(0.2);

    private final SpotCloud cloud;
    private final double spotWidth;
    private final double medianLogIntensity;

    PositionScore(SpotCloud cloud, double spotWidth) {
        this.cloud = cloud;
        this.spotWidth = spotWidth;
        double[] logs = new double[cloud.size()];
        for (int i = 0; i < logs.length; i++) {
            logs[i] = cloud.logIntensity(i);
        }
        Arrays.sort(logs);
        medianLogIntensity = logs.length == 0 ? 0 : logs[logs.length / 2];
    }

    /** The score of a fit, with the nodes taken from its matches that lie within four standard deviations. */
    double of(NetFit.Fit fit) {
        double score = 0;
        for (int i = 0; i < cloud.size(); i++) {
            score += isMatched(fit, i) ? matched(fit, i) : unmatched(i);
        }
        return score;
    }

    boolean isMatched(NetFit.Fit fit, int i) {
        return fit.nodes()[i] != null && fit.distances()[i] < 4 * deviation(fit, i);
    }

    /** Standard deviation of each coordinate expected of a spot about its node, in px. */
    double deviation(NetFit.Fit fit, int i) {
        double r = Math.hypot(
                cloud.x(i) - fit.pose().centreX(), cloud.y(i) - fit.pose().centreY());
        return Math.sqrt(variance(cloud.error(i), r, spotWidth));
    }

    /** The square of it, for a spot with an error of measurement at a distance from the centre. */
    static double variance(double error, double r, double spotWidth) {
        double model = 0.0375 * Math.max(1, spotWidth * spotWidth / 4);
        double lens = 0.0012 * r;
        return error * error + model + lens * lens;
    }

    private double matched(NetFit.Fit fit, int i) {
        double s = deviation(fit, i);
        double d = fit.distances()[i] / s;
        return -0.5 * d * d - Math.log(2 * Math.PI * s * s * cloud.density(i)) + MATCHED_SHARE;
    }

    /** What a spot costs that is left over. */
    double unmatched(int i) {
        double brightness = Math.max(0, Math.min(4, cloud.logIntensity(i) - medianLogIntensity));
        return UNMATCHED_SHARE - brightness;
    }
}
