package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.TwinPattern;
import io.github.zonewright.imagej.bridge.ImagePixels;
import io.github.zonewright.imagej.session.Search;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.indexing.Leftovers;
import io.github.zonewright.indexing.Verdict;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.pattern.Placement;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.SpotFinder;
import java.util.List;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;

class ReadingTest {
    @ParameterizedTest
    @CsvSource({"200, 200", "0.5, 0.5", "1e-3, 0.001", "0.33333333, 0.333333", "1234567, 1234567"})
    void text_isShort(double number, String expected) {
        assertEquals(expected, Reading.text(number));
    }

    @Test
    void fixed_noMinusBeforeZero() {
        assertEquals("0.00", Reading.fixed(-0.001, 2));
        assertEquals("-0.01", Reading.fixed(-0.01, 2));
    }

    @ParameterizedTest
    @ValueSource(strings = {"", "x", "3001", "-1", "NaN", "1,5"})
    void number_wrong_givesAShortReason(String text) {
        Exception refused = assertThrows(
                IllegalArgumentException.class, () -> Reading.number(0.01, 3000).apply(text));
        assertTrue(refused.getMessage().length() < 40, refused.getMessage());
    }

    @Test
    void zone_isReduced() {
        assertEquals(new Uvw(1, -1, 0), Reading.zone("2 -2 0"));
    }

    @ParameterizedTest
    @ValueSource(strings = {"0 0 0", "", "1 1", "a b c"})
    void zone_wrong_isRefused(String text) {
        assertThrows(IllegalArgumentException.class, () -> Reading.zone(text));
    }

    @Test
    void checkedField_saysWhyAndEmptiesItsValue() {
        CheckedField<Double> field = new CheckedField<>("voltage", 6, Reading.number(0.01, 3000));
        field.setText("200");
        assertEquals(Optional.of(200.0), field.value());
        assertEquals("", field.reason());
        field.setText("0");
        assertEquals(Optional.empty(), field.value());
        assertFalse(field.reason().isEmpty());
    }

    @Test
    void stepField_keepsFullPrecisionWhileItShowsLess() {
        StepField field = new StepField("rotation", -360, 360, 1, 2);
        field.show(12.3456789);
        assertEquals(12.3456789, field.value().orElseThrow());
    }

    @Test
    void guide_saysOneThingAtATime() {
        MeasuredPattern measured = SpotFinder.measure(ImagePixels.of(TestPatterns.image()));
        Sitting spots = Sitting.EMPTY.withMeasured(measured);
        Optional<String> right = Optional.empty();
        assertEquals(
                Guide.Step.OPEN, Guide.of(false, false, right, Sitting.EMPTY).step());
        assertEquals(
                Guide.Step.FIND_SPOTS,
                Guide.of(true, false, right, Sitting.EMPTY).step());
        assertEquals(
                Guide.Step.FIND_ORIENTATION, Guide.of(true, false, right, spots).step());
        assertEquals(Guide.Step.WAIT, Guide.of(true, true, right, spots).step());
        Guide wrong = Guide.of(true, false, Optional.of("Voltage."), spots);
        assertEquals("Voltage.", wrong.sentence());
        assertEquals(
                Guide.Step.REFINE,
                Guide.of(true, false, right, spots.withPlacement(TestPatterns.copper110()))
                        .step());
    }

    /** A twin leaves the answer open; once it is found, there is nothing to search any more. */
    @Test
    void guide_openAnswerWithSpotsLeftOver_namesTheSearch() {
        MeasuredPattern measured = SpotFinder.measure(ImagePixels.of(TwinPattern.image()));
        Search known = new Search(
                TestPatterns.copper110().crystal(),
                TestPatterns.copper110().beam(),
                TestPatterns.CONSTANT,
                0.03,
                false);
        Sitting found = Sitting.EMPTY.withMeasured(measured).withResult(known.run(measured, part -> {}, () -> false));
        Guide open = Guide.of(true, false, Optional.empty(), found);
        assertEquals(found.verdict() instanceof Verdict.Open, open.sentence().contains("Left over…"));
        assertTrue(open.sentence().contains("Left over…"), found.verdict().sentence());
        Leftovers.Result left = Leftovers.of(List.of(known.crystal()))
                .search(measured, found.chosen().orElseThrow());
        Sitting whole = found.withFindings(found.findings().withGrains(left.grains()));
        assertTrue(whole.verdict() instanceof Verdict.Settled, whole.verdict().sentence());
        assertFalse(Guide.of(true, false, Optional.empty(), whole).sentence().contains("Left over…"));
    }

    @Test
    void history_givesBackTheLastFirst() {
        var image = TestPatterns.image();
        Sitting.EMPTY.withPlacement(TestPatterns.copper110()).show(image);
        History.of(image).keep(image);
        Sitting.EMPTY.show(image);
        assertTrue(History.of(image).back().orElseThrow().placement().isPresent());
        assertTrue(History.of(image).isEmpty());
    }

    @Test
    void history_oneQuantityInQuickSuccession_isOneChange() {
        var image = TestPatterns.image();
        Placement start = TestPatterns.copper110();
        Sitting.EMPTY.withPlacement(start).show(image);
        for (Placement next : List.of(
                start.turnedBy(0.1),
                start.turnedBy(0.12),
                start.turnedBy(0.12).leanedBy(0.01, 0),
                start.turnedBy(0.12).leanedBy(0.02, 0))) {
            History.of(image).keepBefore(image, next);
            Sitting.of(image).withPlacement(next).show(image);
        }
        assertEquals(
                start.turnedBy(0.12),
                History.of(image).back().orElseThrow().placement().orElseThrow());
        assertEquals(start, History.of(image).back().orElseThrow().placement().orElseThrow());
        assertTrue(History.of(image).isEmpty());
    }
}
