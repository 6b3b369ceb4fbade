package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.Prefs;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.Instrument;
import javax.swing.JFrame;
import javax.swing.JTextField;
import org.junit.jupiter.api.AfterEach;
import org.junit.jupiter.api.Tag;
import org.junit.jupiter.api.Test;

/** On a first run nobody has told a scale, and none is shown. */
@Tag("window")
class FirstScaleTest {
    private static final String KIND = "zonewright.scalekind";
    private final Instrument before = Instrument.last();

    @AfterEach
    void close() {
        before.remember();
        Screen.clear();
    }

    @Test
    void scale_isAskedFor_andKeptOnceTold() {
        Screen.start();
        for (String value : new String[] {"scalekind", "scale"}) {
            Prefs.set(KIND.replace("scalekind", value), null);
        }
        Screen.show(TestPatterns.image());
        JFrame frame = Screen.workbench();
        Screen.await(() -> Screen.guide(frame).startsWith("Give the scale"));
        assertEquals("", Screen.find(frame, "scale", JTextField.class).getText());
        Screen.type(frame, "scale", "120");
        Screen.await(() -> !Screen.guide(frame).startsWith("Give the scale"));
        assertTrue(Instrument.isRemembered());
    }
}
