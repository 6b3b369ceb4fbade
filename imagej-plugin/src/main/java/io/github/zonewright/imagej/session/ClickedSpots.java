package io.github.zonewright.imagej.session;

import ij.ImagePlus;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.indexing.ClickedSpot;
import io.github.zonewright.indexing.HandAnswer;
import io.github.zonewright.indexing.HandIndexing;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.PatternCentre;
import io.github.zonewright.spots.SpotNet;
import java.util.ArrayList;
import java.util.List;
import java.util.Optional;

/** Spots that a person clicked, or typed, with their indices or without, and the zones that they may belong to. */
public final class ClickedSpots {
    private static final double PERCENT = 0.01;

    private ClickedSpots() {}

    /**
     * The places where the ruler of an image was laid.
     *
     * @param sitting what is known of the image
     * @return the places, in the order of the clicks
     */
    public static List<PixelPoint> ofRuler(Sitting sitting) {
        return sitting.measurement().ruler().stream().map(RulerPoint::place).toList();
    }

    /**
     * Reads places, each come to rest at the measured spot nearby.
     *
     * @param text for example {@code 130.5 88; 171 120}, in px
     * @param measured the measured spots
     * @return the places
     * @throws IllegalArgumentException if a part is no two numbers
     */
    public static List<PixelPoint> places(String text, MeasuredPattern measured) {
        List<PixelPoint> places = new ArrayList<>();
        for (String part : text.strip().split(";")) {
            String[] numbers = part.strip().split("[,\\s]+");
            try {
                if (numbers.length == 2) {
                    PixelPoint at = new PixelPoint(Double.parseDouble(numbers[0]), Double.parseDouble(numbers[1]));
                    places.add(SpotPick.near(measured, at, SpotPick.reach(measured))
                            .map(s -> s.position())
                            .orElse(at));
                    continue;
                }
            } catch (NumberFormatException e) {
                throw wrong(part, e);
            }
            throw wrong(part, null);
        }
        return places;
    }

    private static IllegalArgumentException wrong(String part, Exception cause) {
        return new IllegalArgumentException(
                "spots: \"" + part.strip() + "\", expected x and y in px for each, as 130.5 88; 171 120", cause);
    }

    /**
     * Gives places the indices that a person says, in their order.
     *
     * @param places the places
     * @param hkl for example {@code 1 1 1; ; 2 0 0}; blank where nothing is said
     * @return the spots
     * @throws IllegalArgumentException if a part is no reflection, or there are more than places
     */
    public static List<ClickedSpot> of(List<PixelPoint> places, String hkl) {
        String[] said = hkl == null || hkl.isBlank() ? new String[0] : hkl.split(";");
        if (said.length > places.size()) {
            throw new IllegalArgumentException("indices: those of " + said.length + " spots, expected at most "
                    + places.size() + ", one for each spot");
        }
        List<ClickedSpot> spots = new ArrayList<>();
        for (int i = 0; i < places.size(); i++) {
            boolean blank = i >= said.length || said[i].isBlank();
            spots.add(new ClickedSpot(places.get(i), blank ? Optional.empty() : Optional.of(Hkl.parse(said[i]))));
        }
        return spots;
    }

    /**
     * The zones that spots of an image may belong to.
     *
     * @param image the image
     * @param sitting what is known of it
     * @param said what is said of the instrument
     * @param crystals the crystals
     * @param spots the spots
     * @return the answers, best first
     * @throws IllegalArgumentException if the centre is not known, or the spots name no zone
     */
    public static List<HandAnswer> index(
            ImagePlus image, Sitting sitting, Instrument said, List<Crystal> crystals, List<ClickedSpot> spots) {
        PixelPoint centre = sitting.measured()
                .flatMap(MeasuredPattern::centre)
                .or(() -> sitting.measurement().net().flatMap(SpotNet::refinedCentre))
                .map(PatternCentre::position)
                .orElseThrow(() ->
                        new IllegalArgumentException("the centre is not known: set it with the hand tool in Spots"));
        return HandIndexing.of(crystals, said.beam(), said.camera(centre, image), PERCENT * said.tolerancePercent())
                .index(spots);
    }
}
