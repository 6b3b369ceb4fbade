package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import io.github.zonewright.document.SpotTable;
import io.github.zonewright.imagej.session.ScaleKind;
import java.io.IOException;
import java.nio.charset.StandardCharsets;
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

/**
 * Compares the vocabulary of DEVELOPERS.md with the words on the screens and in the files, which are read from the sources:
 * whoever adds a label says in that table where its words come from. In the table's first column each label stands in
 * {@code `…`}; a star at its end stands for any ending.
 */
class VocabularyTest {
    private static final Path DEVELOPERS = Path.of("..", "DEVELOPERS.md");
    private static final Path PLUGIN = Path.of("src/main/java/io/github/zonewright/imagej");
    private static final Path RECORD = Path.of("../core/src/main/java/io/github/zonewright/document/package-info.java");
    private static final String TEXT = "\"([^\"]*\\p{L}[^\"]*)\"";

    @Test
    void labelsOfCommands_areInTheVocabulary() throws IOException {
        check(texts(PLUGIN.resolve("command"), "@Parameter\\([^;]*?\\blabel = " + TEXT));
    }

    @Test
    void menu_isInTheVocabulary() throws IOException {
        check(texts(PLUGIN, "menuPath = \"Plugins>Zonewright>([^\"]+)\""));
    }

    @Test
    void choices_areInTheVocabulary() throws IOException {
        check(Stream.of(ScaleKind.values()).map(ScaleKind::label).toList());
    }

    @Test
    void workbench_isInTheVocabulary() throws IOException {
        Path workbench = PLUGIN.resolve("workbench");
        List<String> words = new ArrayList<>(
                texts(workbench, "\\b(?:row|super|JButton|JCheckBox|button|heading|addTab|column)\\(" + TEXT));
        words.addAll(texts(workbench, "(?:COLUMNS = \\{\\s*|\\G,\\s*)" + TEXT));
        words.addAll(texts(workbench, "String NAME = " + TEXT));
        assertTrue(words.contains("Score") && words.contains("Zonewright Pattern Hand Tool"), words.toString());
        check(words);
    }

    @Test
    void columnsOfTables_areInTheVocabulary() throws IOException {
        check(SpotTable.columns());
        check(texts(PLUGIN.resolve("bridge"), "(?:addValue|new Column)\\(\\s*" + TEXT));
    }

    @Test
    void itemsOfTheRecord_areInTheVocabulary() throws IOException {
        check(texts(RECORD, "\\{@code (_zonewright_[a-z_0-9]+)\\}</td>"));
    }

    @Test
    void report_isInTheVocabulary() throws IOException {
        check(texts(RECORD.resolveSibling("ReportPage.java"), "\\b(?:section|item|term)\\(\\s*" + TEXT));
    }

    @Test
    void printedAnswer_isInTheVocabulary() throws IOException {
        check(texts(PLUGIN.resolve("demo"), "line\\(\\s*out,\\s*" + TEXT));
    }

    private static void check(List<String> words) throws IOException {
        assertTrue(words.size() > 3, "too few found; is the source written otherwise now? " + words);
        Set<String> known = vocabulary();
        Set<String> missing = new TreeSet<>(words);
        missing.removeIf(word -> known.contains(word)
                || known.stream().anyMatch(k -> k.endsWith("*") && word.startsWith(k.substring(0, k.length() - 1))));
        assertEquals(Set.of(), missing, "not in the vocabulary of DEVELOPERS.md");
    }

    private static Set<String> vocabulary() throws IOException {
        Set<String> known = new TreeSet<>();
        for (String line : Files.readAllLines(DEVELOPERS, StandardCharsets.UTF_8)) {
            if (line.startsWith("| `")) {
                Matcher term = Pattern.compile("`([^`]+)`").matcher(line.substring(1, line.indexOf('|', 1)));
                while (term.find()) {
                    known.add(term.group(1));
                }
            }
        }
        return known;
    }

    /** What the pattern's group catches in a source file, or in all of a folder. */
    private static List<String> texts(Path sources, String pattern) throws IOException {
        List<String> found = new ArrayList<>();
        try (Stream<Path> files = Files.walk(sources)) {
            for (Path file :
                    files.filter(f -> f.toString().endsWith(".java")).sorted().toList()) {
                Matcher matcher = Pattern.compile(pattern).matcher(Files.readString(file, StandardCharsets.UTF_8));
                while (matcher.find()) {
                    found.add(matcher.group(1));
                }
            }
        }
        return found;
    }
}
