package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.ImagePlus;
import io.github.zonewright.cif.CifFile;
import io.github.zonewright.document.FitDocument;
import io.github.zonewright.imagej.Fingerprint;
import io.github.zonewright.imagej.TestPatterns;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.pattern.Placement;
import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.Optional;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;

/** A pattern laid by hand, with no fit behind it, is kept as what it is. */
class KeepLaidPatternTest {
    private static final String KEEP = "command.KeepSolution";
    private static final Placement LAID = TestPatterns.copper110().turnedBy(0.05);

    @TempDir
    private Path folder;

    private static ImagePlus laid() {
        ImagePlus image = TestPatterns.imageOfUser();
        Sitting.EMPTY.withPlacement(LAID).show(image);
        return image;
    }

    @Test
    void record_saysThatItWasLaid_andLaysItAgain() throws IOException {
        ImagePlus image = laid();
        Fingerprint user = Fingerprint.of(image);
        Path record = folder.resolve("laid.cif");
        assertEquals(Optional.empty(), Launching.macro(image, KEEP, "record=[" + record + "]"));
        user.assertSame(image);
        FitDocument read = FitDocument.read(CifFile.read(record));
        assertEquals(LAID, read.placement());
        assertTrue(read.solution().isEmpty());
        assertTrue(read.image().isPresent() && read.created().isPresent());
        ImagePlus other = TestPatterns.image();
        assertEquals(Optional.empty(), Launching.macro(other, "command.OpenRecord", "record=[" + record + "]"));
        assertEquals(LAID, Sitting.of(other).placement().orElseThrow());
        assertTrue(Sitting.of(other).chosen().isEmpty());
    }

    @Test
    void report_saysThatItWasLaid_andHasNoVerdict() throws IOException {
        Path report = folder.resolve("laid.html");
        assertEquals(Optional.empty(), Launching.macro(laid(), KEEP, "report=[" + report + "]"));
        String html = Files.readString(report);
        assertTrue(html.contains("Laid by hand: no fit stands behind this pattern."), html);
        assertTrue(html.contains("data:image/png"), "its picture");
        for (String claim : new String[] {"Spots explained", "Residual", "Score", "settled", "tied"}) {
            assertFalse(html.contains(claim), claim);
        }
    }

    @Test
    void spots_areRefused_sinceNoneIsExplained() {
        Path spots = folder.resolve("laid.csv");
        String said = Launching.macro(laid(), KEEP, "spots=[" + spots + "]").orElse("");
        assertTrue(said.contains("laid by hand"), said);
        assertFalse(Files.exists(spots));
        String none = Launching.macro(TestPatterns.image(), KEEP, "record=[" + spots + "]")
                .orElse("");
        assertTrue(none.contains("no pattern laid over it"), none);
    }
}
