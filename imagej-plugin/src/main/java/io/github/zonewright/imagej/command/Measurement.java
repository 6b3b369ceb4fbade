package io.github.zonewright.imagej.command;

import io.github.zonewright.image.Mask;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotNet;
import io.github.zonewright.spots.SpotNetFinder;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/**
 * What is measured on one image, how it is to be measured, and what the ruler was laid to.
 *
 * @param pattern spots and centre, once they are measured
 * @param net their net, row or neither; there as soon as the spots are
 * @param darkSpots whether spots are dark on bright ground, if a person said so
 * @param hidden the hidden area, if a person set it
 * @param ruler where the ruler was laid, in the order of the readings
 * @param shown whether this is drawn in place of a pattern that is laid over the image
 */
public record Measurement(
        Optional<MeasuredPattern> pattern,
        Optional<SpotNet> net,
        Optional<Boolean> darkSpots,
        Optional<Mask> hidden,
        List<RulerPoint> ruler,
        boolean shown) {

    /** Nothing is measured, and nothing said. */
    public static final Measurement NONE =
            new Measurement(Optional.empty(), Optional.empty(), Optional.empty(), Optional.empty(), List.of(), false);

    /** Copies the list. */
    public Measurement {
        ruler = List.copyOf(ruler);
    }

    /**
     * With other spots, whose net is sought.
     *
     * @param measured the spots
     * @return the changed measurement
     */
    public Measurement withPattern(MeasuredPattern measured) {
        SpotNet found = SpotNetFinder.find(measured);
        return new Measurement(Optional.of(measured), Optional.of(found), darkSpots, hidden, ruler, shown);
    }

    /**
     * With spots said to be dark or bright.
     *
     * @param dark whether they are dark on bright ground; empty for what the image itself tells
     * @return the changed measurement
     */
    public Measurement withDarkSpots(Optional<Boolean> dark) {
        return new Measurement(pattern, net, dark, hidden, ruler, shown);
    }

    /**
     * With another hidden area.
     *
     * @param area the area, or empty for the one that is found by itself
     * @return the changed measurement
     */
    public Measurement withHidden(Optional<Mask> area) {
        return new Measurement(pattern, net, darkSpots, area, ruler, shown);
    }

    /**
     * With one more reading.
     *
     * @param point where the ruler is laid
     * @return the changed measurement
     */
    public Measurement withRuler(RulerPoint point) {
        List<RulerPoint> more = new ArrayList<>(ruler);
        more.add(point);
        return new Measurement(pattern, net, darkSpots, hidden, more, shown);
    }

    /**
     * Without readings.
     *
     * @return the changed measurement
     */
    public Measurement withoutRuler() {
        return new Measurement(pattern, net, darkSpots, hidden, List.of(), shown);
    }

    /**
     * Drawn in place of a pattern, or not.
     *
     * @param drawn whether it is
     * @return the changed measurement
     */
    public Measurement withShown(boolean drawn) {
        return new Measurement(pattern, net, darkSpots, hidden, ruler, drawn);
    }
}
