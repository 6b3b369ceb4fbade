package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.IOException;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Set;
import java.util.TreeSet;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.ValueSource;

/** The page of help as it stands in the jar; that it opens at each section is tested with the window. */
class HelpPageTest {
    private static final String HTML = HelpWindow.html();

    @Test
    void links_leadToAnchorsOfThePage() {
        List<String> links = all("href=\"([^\"]*)\"");
        assertTrue(links.size() >= 10, links.toString());
        Set<String> anchors = new TreeSet<>(all("name=\"([^\"]+)\""));
        for (String link : links) {
            assertTrue(link.startsWith("#") && anchors.contains(link.substring(1)), link);
        }
    }

    @Test
    void anchors_areUnique() {
        List<String> anchors = all("name=\"([^\"]+)\"");
        assertEquals(anchors.size(), new TreeSet<>(anchors).size(), anchors.toString());
    }

    /** Each part with a heading has a button that leads here; the headings are read from the sources. */
    @Test
    void headings_haveAnchors() throws IOException {
        Path sources = Path.of("src/main/java/io/github/zonewright/imagej/workbench");
        Set<String> anchors = new TreeSet<>(all("name=\"([^\"]+)\""));
        Set<String> headings = new TreeSet<>();
        try (Stream<Path> files = Files.list(sources)) {
            for (Path file : files.toList()) {
                String source = Files.readString(file);
                String made = "new (?:Section|KeepPanel)\\(\"([^\"]+)\"";
                Matcher heading = Pattern.compile(
                                source.contains(" extends Section") ? made + "|super\\(\"([^\"]+)\"" : made)
                        .matcher(source);
                while (heading.find()) {
                    headings.add(heading.group(1) == null ? heading.group(2) : heading.group(1));
                }
            }
        }
        assertTrue(headings.size() >= 13, headings.toString());
        headings.removeIf(heading -> anchors.contains(HelpWindow.anchor(heading)));
        assertEquals(Set.of(), headings, "no help on these");
    }

    /** Offline: nothing of the page comes from elsewhere. */
    @Test
    void page_needsNothingElse() {
        assertFalse(Pattern.compile("https?:|src=|<link|<script|@import|url\\(")
                .matcher(HTML)
                .find());
    }

    @ParameterizedTest
    @ValueSource(strings = {"pole piece", "toxic", "X-rays", "no compliance tool", "mirrored", "half a turn"})
    void cautionsAndLimits_areSaid(String words) {
        assertTrue(HTML.replaceAll("\\s+", " ").contains(words), words);
    }

    @ParameterizedTest
    @ValueSource(strings = {"instrument", "crystal", "measured-spots", "solutions", "by-hand", "keep"})
    void eachPart_saysWhatToDoWhatItMeansAndItsLimits(String anchor) {
        String from = HTML.substring(HTML.indexOf("name=\"" + anchor + "\""));
        String part = from.substring(0, from.indexOf("<h2>"));
        for (String heading : List.of("What to do.", "What it means.", "Limits.")) {
            assertTrue(part.contains(heading), anchor + ": " + heading);
        }
    }

    private static List<String> all(String pattern) {
        List<String> found = new ArrayList<>();
        var matcher = Pattern.compile(pattern).matcher(HTML);
        while (matcher.find()) {
            found.add(matcher.group(1));
        }
        return found;
    }
}
