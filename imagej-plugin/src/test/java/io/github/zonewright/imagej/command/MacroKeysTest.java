package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertDoesNotThrow;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertThrows;

import java.util.List;
import org.junit.jupiter.api.Test;

/** The form of a macro's options is that of ImageJ's macro language: key=value, key=[two words], flag. */
class MacroKeysTest {
    private static final List<String> KNOWN = List.of("crystal", "tolerance", "indices");

    @Test
    void check_knownKeys_pass() {
        assertDoesNotThrow(
                () -> MacroKeys.check("crystal=[Sigma phase, indexed as=it is] tolerance=3 indices ", KNOWN));
        assertDoesNotThrow(() -> MacroKeys.check("crystal=[] tolerance='3' ", KNOWN));
        assertDoesNotThrow(() -> MacroKeys.check("", KNOWN));
    }

    @Test
    void check_misspeltKey_saysWhichAreKnown() {
        IllegalArgumentException said =
                assertThrows(IllegalArgumentException.class, () -> MacroKeys.check("cristal=[Sigma phase]", KNOWN));
        assertEquals("macro key \"cristal\": unknown, expected one of crystal, tolerance, indices", said.getMessage());
        assertThrows(IllegalArgumentException.class, () -> MacroKeys.check("tolerance=3 labels", KNOWN));
    }
}
