package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.imagej.session.ScaleKind;
import java.util.List;
import java.util.stream.Collectors;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;
import org.junit.jupiter.params.provider.ValueSource;
import org.scijava.command.Command;

class CommandParameterTest {
    private final List<CommandParameter> parameters = CommandParameter.of(new FindZoneAxis());

    @Test
    void title_isTheLastPartWithoutDots() {
        assertEquals("Find Zone Axis", CommandParameter.title(new FindZoneAxis()));
    }

    @Test
    void readMacro_takesWhatIsThereAndLeavesTheRest() {
        read("kilovolts=300 indices scalekind=[camera length, mm]");
        assertEquals("300", parameter("kilovolts").text());
        assertEquals("true", parameter("indices").text());
        assertEquals("camera length, mm", parameter("scalekind").text());
        assertEquals("500", parameter("scale").text());
        assertEquals("true", parameter("table").text());
    }

    /** A macro records flags with their value, so that a flag whose default is true can be cleared. */
    @ParameterizedTest
    @CsvSource({"table=false, false", "table=true, true", "table, true", "kilovolts=200, true"})
    void readMacro_flags(String options, String expected) {
        read(options);
        assertEquals(expected, parameter("table").text());
    }

    @Test
    void readMacro_nameAsPartOfAnother_isNotTaken() {
        read("scalekind=[image calibration]");
        assertEquals("500", parameter("scale").text());
    }

    @ParameterizedTest
    @ValueSource(strings = {"0", "-200", "NaN", "3001", "abc", "", "1e999"})
    void setText_wrongVoltage_saysWhatWasExpected(String text) {
        Exception refused = assertThrows(
                IllegalArgumentException.class, () -> parameter("kilovolts").setText(text));
        assertTrue(refused.getMessage().contains("Accelerating voltage (kV)"), refused.getMessage());
        assertTrue(refused.getMessage().contains("expected"), refused.getMessage());
    }

    @Test
    void setText_fraction_isNoBinning() {
        assertThrows(IllegalArgumentException.class, () -> parameter("binning").setText("1.5"));
    }

    @Test
    void text_wholeNumbers_haveNoPoint() {
        assertEquals("200", parameter("kilovolts").text());
        parameter("kilovolts").setText("0.25");
        assertEquals("0.25", parameter("kilovolts").text());
    }

    @ParameterizedTest
    @CsvSource(
            value = {
                "camera constant,px·Å|camera constant, px·Å",
                "CAMERA LENGTH|camera length, mm",
                "image|image calibration",
                "camera constant mm A|camera constant, mm·Å"
            },
            delimiter = '|')
    void choice_forgivesCaseSpacesAndSigns(String text, String expected) {
        assertEquals(expected, ScaleKind.ofLabel(text).label());
    }

    @ParameterizedTest
    @ValueSource(strings = {"camera", "camera constant", "", "px"})
    void choice_doubtful_listsTheChoices(String text) {
        Exception refused = assertThrows(IllegalArgumentException.class, () -> ScaleKind.ofLabel(text));
        assertTrue(refused.getMessage().contains("camera length, mm"), refused.getMessage());
    }

    /** What macros of older versions say, and in which order the recorder writes it. */
    @ParameterizedTest
    @CsvSource(
            delimiter = '|',
            value = {
                "ShowCrystal|crystal=Aluminium cif= kilovolts=200 smallestd=0.8",
                "CalibrateRings|crystal=Aluminium cif= kilovolts=200 roughscale= tolerance=3 mirrored=false rings=true"
                        + " table=true plots=true use=true keepcalibration= instrument= cameralength= pixelsize= binning=1",
                "DrawZoneChart|crystal=Aluminium cif= kilovolts=200 zones=9 scalekind=camera constant, px·Å scale=500"
                        + " pixelsize=14 binning=1 patternside=512 paper=20 sheet=",
                "LayPattern|target=current image crystal=Aluminium cif= kilovolts=200 scalekind=camera constant, px·Å"
                        + " scale=500 pixelsize=14 binning=1 zone=0 0 1 reference= rotation=0 leanx=0 leany=0 centre="
                        + " mirrored=false thickness=50 indices=false side=512",
            })
    void parameters_haveTheirOrderAndDefaults(String name, String expected) throws ReflectiveOperationException {
        Command command = Class.forName(getClass().getPackageName() + "." + name)
                .asSubclass(Command.class)
                .getConstructor()
                .newInstance();
        assertEquals(
                expected,
                CommandParameter.of(command).stream()
                        .filter(CommandParameter::isAsked)
                        .map(p -> p.name() + "=" + p.text())
                        .collect(Collectors.joining(" ")));
    }

    private void read(String options) {
        parameters.stream().filter(CommandParameter::isAsked).forEach(p -> p.readMacro(options + " "));
    }

    private CommandParameter parameter(String name) {
        return parameters.stream()
                .filter(p -> p.name().equals(name))
                .findFirst()
                .orElseThrow();
    }
}
