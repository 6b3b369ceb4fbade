package io.github.zonewright.spots;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertInstanceOf;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.image.PixelPoint;
import java.util.ArrayList;
import java.util.List;
import org.junit.jupiter.api.Test;

/** A person's changes to what was found. */
class SpotsByHandTest {

    private static final DrawnNet NET = DrawnNet.of(256, 256, new PixelPoint(123.4, 131.7), 40, 0.4);
    private static final PixelPoint FAINT = new PixelPoint(60.2, 207.9);
    private static final PixelPoint EMPTY = new PixelPoint(30, 30);
    /** With one spot too faint to be found: a signal to noise of about 4. */
    private static final MeasuredPattern PATTERN = SpotFinder.measure(
            NET.withBeam(1.8, 400).spot(FAINT.x(), FAINT.y(), 1.8, 8.5).floats(12));

    private static PixelPoint beside(PixelPoint place, double dx, double dy) {
        return new PixelPoint(place.x() + dx, place.y() + dy);
    }

    private static String refusal(Runnable change) {
        return assertThrows(IllegalArgumentException.class, change::run).getMessage();
    }

    @Test
    void withSpotNear_faintSpot_isMeasuredOnItsPeak() {
        assertEquals(NET.nodes().size(), PATTERN.spots().size());
        MeasuredPattern more = PATTERN.withSpotNear(beside(FAINT, 1.5, -1.2));
        List<MeasuredSpot> added = more.spots().stream().filter(more::isByHand).toList();
        assertEquals(1, added.size());
        MeasuredSpot spot = added.get(0);
        assertEquals(0, spot.position().distanceTo(FAINT), 4 * spot.positionError());
        assertTrue(spot.signalToNoise() > 3 && spot.signalToNoise() < 5, "signal to noise " + spot.signalToNoise());
        assertEquals(8.5 * 2 * Math.PI * 1.8 * 1.8, spot.intensity(), 0.8 * spot.intensity());
        assertEquals(NET.nodes().size() + 1, more.spots().size());
        assertEquals(NET.nodes().size(), PATTERN.spots().size(), "the pattern itself stays");
        assertEquals(1, SpotNetFinder.find(more).offNet().size());
    }

    @Test
    void withSpotNear_removedSpot_isAsItWasFound() {
        MeasuredSpot found = PATTERN.spots().get(4);
        MeasuredPattern fewer = PATTERN.withoutSpotNear(beside(found.position(), 1, 1));
        assertFalse(fewer.spots().contains(found));
        assertEquals(PATTERN.spots().size() - 1, fewer.spots().size());
        MeasuredPattern again = fewer.withSpotNear(beside(found.position(), -2, 1));
        assertTrue(again.spots().contains(found));
        assertTrue(again.isByHand(found));
        assertFalse(PATTERN.isByHand(found));
    }

    @Test
    void withSpotNear_nothingThere_isRefusedWithPlaceAndSignalToNoise() {
        String message = refusal(() -> PATTERN.withSpotNear(EMPTY));
        assertTrue(
                message.matches("No spot rises near 30\\.0, 30\\.0: the signal to noise is -?[0-2]\\.\\d at most within"
                        + " 4\\.\\d px, expected at least 3\\."),
                message);
        PixelPoint there = PATTERN.spots().get(0).position();
        assertTrue(refusal(() -> PATTERN.withSpotNear(there)).startsWith("No other spot rises near"));
        assertTrue(refusal(() -> PATTERN.withoutSpotNear(EMPTY)).startsWith("No spot within 4."));
        assertTrue(refusal(() -> PATTERN.withSpotNear(new PixelPoint(-50, 12))).startsWith("No spot rises near -50.0"));
    }

    @Test
    void withSpotMoved_ontoAnotherPeak_isMeasuredThere() {
        MeasuredSpot from = PATTERN.spots().get(0);
        MeasuredPattern moved = PATTERN.withSpotMoved(from.position(), beside(FAINT, -1, 1));
        assertEquals(PATTERN.spots().size(), moved.spots().size());
        assertFalse(moved.spots().contains(from));
        MeasuredSpot to =
                moved.spots().stream().filter(moved::isByHand).findFirst().orElseThrow();
        assertEquals(0, to.position().distanceTo(FAINT), 1.5);
        refusal(() -> PATTERN.withSpotMoved(from.position(), EMPTY));
    }

    @Test
    void withCentre_asGiven_isTheOnlyOne() {
        PixelPoint place = new PixelPoint(-20, 40);
        MeasuredPattern centred = PATTERN.withCentre(place, 2.5);
        assertTrue(centred.isCentreByHand());
        assertEquals(
                new PatternCentre(place, 2.5, PatternCentre.Source.BY_HAND),
                centred.centre().orElseThrow());
        assertEquals(1, centred.centres().size());
        assertTrue(centred.directBeam().isEmpty());
        assertTrue(centred.spots().contains(PATTERN.directBeam().orElseThrow()), "a spot like others now");
        MeasuredPattern found = centred.withFoundCentre();
        assertFalse(found.isCentreByHand());
        assertEquals(PATTERN.centres(), found.centres());
        assertEquals(PATTERN.spots(), found.spots());
        refusal(() -> PATTERN.withCentre(place, 0));
    }

    @Test
    void withDirectBeamNear_anotherSpot_isTheCentre() {
        MeasuredSpot spot = PATTERN.spots().get(3);
        MeasuredPattern centred = PATTERN.withDirectBeamNear(beside(spot.position(), 2, -1));
        assertEquals(spot, centred.directBeam().orElseThrow());
        PatternCentre centre = centred.centre().orElseThrow();
        assertEquals(PatternCentre.Source.DIRECT_BEAM, centre.source());
        assertEquals(0, centre.position().distanceTo(spot.position()), 3 * spot.positionError());
        assertTrue(centre.error() <= spot.positionError());
        assertFalse(centred.spots().contains(spot));
        MeasuredPattern same = PATTERN.withDirectBeamNear(beside(NET.centre(), 2, -1));
        assertEquals(PATTERN.spots(), same.spots());
        assertEquals(PATTERN.directBeam(), same.directBeam());
        assertTrue(refusal(() -> PATTERN.withDirectBeamNear(EMPTY)).contains("at least 10"));
    }

    @Test
    void withoutSpotNear_directBeam_theCentreIsFoundAnew() {
        MeasuredPattern without = PATTERN.withoutSpotNear(NET.centre());
        assertTrue(without.directBeam()
                .filter(PATTERN.directBeam().orElseThrow()::equals)
                .isEmpty());
        MeasuredPattern byHand = PATTERN.withDirectBeamNear(NET.centre()).withoutSpotNear(NET.centre());
        assertFalse(byHand.isCentreByHand());
    }

    @Test
    void find_editedPattern_theNetIsThatOfTheEditedSpots() {
        MeasuredPattern edited = PATTERN;
        List<MeasuredSpot> kept = new ArrayList<>();
        for (MeasuredSpot spot : PATTERN.spots()) {
            double across = Math.abs((spot.position().x() - NET.centre().x()) * Math.sin(0.4)
                    - (spot.position().y() - NET.centre().y()) * Math.cos(0.4));
            if (across < 3) {
                kept.add(spot);
            } else {
                edited = edited.withoutSpotNear(spot.position());
            }
        }
        assertEquals(kept, edited.spots());
        SpotNet.SystematicRow row = assertInstanceOf(SpotNet.SystematicRow.class, SpotNetFinder.find(edited));
        assertEquals(40, row.spacing().value(), 0.05);
    }
}
