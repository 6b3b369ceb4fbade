package io.github.zonewright.spots;

import java.util.ArrayList;
import java.util.List;
import java.util.function.ToDoubleFunction;

/**
 * The shape that most spots of an image have: the median of what fits to the clearest lone ones say.
 *
 * @param expected that shape, and how far a single spot departs from it
 * @param responseOfHeight the filter's response to a spot over the spot's height
 */
record CommonShape(SpotShape.Expected expected, double responseOfHeight) {

    /** So many spots are looked at, strong and weak ones alike, since two in one are among the strongest. */
    private static final int MOST = 16;

    private static final int ENOUGH = 3;
    private static final double CLEAR = 30;
    private static final double REACH = 2.6;

    /** What is thought of a spot before any was seen. */
    private static final SpotShape.Expected ANY = new SpotShape.Expected(new SpotShape(0, 0, 0, 0), 0.3, 0.3, 0.7);

    private static final SpotShape.Expected UNKNOWN = new SpotShape.Expected(new SpotShape(0, 0, 0, 0), 0.15, 0.1, 0.2);
    private static final CommonShape ANY_SPOT = new CommonShape(UNKNOWN, PositionError.RESPONSE_OF_HEIGHT);
    /** Least departures of single spots, however alike those looked at are. */
    private static final double LEAST = 0.03;
    /** Where many of them are two spots, they seem to differ more in size than they do. */
    private static final double MOST_SIZE = 0.12;
    /** Scatter of a normal distribution over its median deviation. */
    private static final double NORMAL = 1.4826;

    /** The shape of peaks that have no neighbour. */
    static CommonShape of(SpotSamples.Source source, List<PeakSearch.Peak> alone) {
        List<SpotFit.Result> fits = new ArrayList<>();
        List<Double> responses = new ArrayList<>();
        List<PeakSearch.Peak> clear =
                alone.stream().filter(peak -> peak.signalToNoise() > CLEAR).toList();
        int looked = Math.min(MOST, clear.size());
        for (int i = 0; i < looked; i++) {
            PeakSearch.Peak peak = clear.get(i * clear.size() / looked);
            double height = peak.height() / PositionError.RESPONSE_OF_HEIGHT;
            SpotSamples.around(source, List.of(peak), List.of(), ANY_SPOT, REACH)
                    .flatMap(samples -> new SpotFit(samples, ANY, false).from(new double[] {0, 0, height}))
                    .ifPresent(result -> {
                        fits.add(result);
                        responses.add(peak.height() / result.spots()[0][2]);
                    });
        }
        if (fits.size() < ENOUGH) {
            return ANY_SPOT;
        }
        double[] middle = new double[SpotShape.UNKNOWNS];
        double[] scatter = new double[SpotShape.UNKNOWNS];
        for (int i = 0; i < SpotShape.UNKNOWNS; i++) {
            int which = i;
            middle[i] = median(fits, fit -> fit.shape().values()[which]);
            double seen = NORMAL * median(fits, fit -> Math.abs(fit.shape().values()[which] - middle[which]));
            double error = median(fits, fit -> fit.shapeError()[which]);
            scatter[i] = Math.max(LEAST, Math.sqrt(Math.max(0, seen * seen - error * error)));
        }
        return new CommonShape(
                new SpotShape.Expected(
                        new SpotShape(middle[0], middle[1], middle[2], middle[3]),
                        Math.min(scatter[0], MOST_SIZE),
                        Math.max(scatter[1], scatter[2]),
                        scatter[3]),
                median(responses, response -> response));
    }

    private static <T> double median(List<T> of, ToDoubleFunction<T> number) {
        double[] values = of.stream().mapToDouble(number).sorted().toArray();
        return (values[values.length / 2] + values[(values.length - 1) / 2]) / 2;
    }
}
