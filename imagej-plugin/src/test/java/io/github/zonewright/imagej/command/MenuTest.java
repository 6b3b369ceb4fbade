package io.github.zonewright.imagej.command;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertFalse;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.Prefs;
import io.github.zonewright.crystal.CandidateList;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.crystal.ShelfEntry;
import io.github.zonewright.imagej.Launch;
import io.github.zonewright.imagej.session.UserFolder;
import java.io.BufferedReader;
import java.io.IOException;
import java.io.InputStreamReader;
import java.io.UncheckedIOException;
import java.net.URISyntaxException;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.ArrayList;
import java.util.List;
import java.util.Map;
import java.util.TreeMap;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.stream.Stream;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.api.io.TempDir;
import org.scijava.command.Command;
import org.scijava.plugin.Plugin;

/** Compares the menu of plain ImageJ with what the commands declare for Fiji. */
class MenuTest {
    private static final String ROOT = "io.github.zonewright.imagej.";
    private static final Pattern LINE =
            Pattern.compile("([^,]+), \"([^\"]+)\", " + Pattern.quote(Launch.class.getName()) + "\\(\"([^\"]+)\"\\)");

    @Test
    void pluginsConfig_saysWhatTheCommandsDeclare() throws Exception {
        Map<String, String> declared = new TreeMap<>();
        for (Class<?> command : commands()) {
            declared.put(command.getName(), command.getAnnotation(Plugin.class).menuPath());
        }
        assertFalse(declared.isEmpty());
        assertEquals(declared, listed());
    }

    @Test
    void labels_areUnique() throws IOException {
        List<String> labels = listed().values().stream()
                .map(path -> path.substring(path.lastIndexOf('>') + 1))
                .toList();
        assertEquals(labels.size(), labels.stream().distinct().count());
    }

    @Test
    void parameterNames_suitMacros() throws Exception {
        for (Class<?> type : commands()) {
            List<String> names = parameters(type).stream()
                    .filter(CommandParameter::isAsked)
                    .map(CommandParameter::name)
                    .toList();
            for (String name : names) {
                assertEquals(name.toLowerCase(java.util.Locale.ROOT), name);
                assertTrue(names.stream().noneMatch(other -> other.endsWith("_" + name)), name);
            }
        }
    }

    @Test
    void parameters_haveLabels() throws Exception {
        for (Class<?> type : commands()) {
            for (CommandParameter parameter : parameters(type)) {
                assertTrue(!parameter.isAsked() || !parameter.label().isEmpty(), type + " " + parameter.name());
            }
        }
    }

    @Test
    void crystalChoices_areTheShelfAndTheUsers(@TempDir Path folder) throws Exception {
        Prefs.set(UserFolder.KEY, folder.toString());
        UserFolder.keep(CrystalShelf.find("copper").orElseThrow(), "Copper of mine");
        UserFolder.lists().create(CandidateList.named("Bearing metals"));
        List<String> crystals = Stream.concat(
                        CrystalShelf.entries().stream().map(ShelfEntry::name), Stream.of("Copper of mine"))
                .toList();
        List<String> withLists =
                Stream.concat(crystals.stream(), Stream.of("Bearing metals")).toList();
        int found = 0;
        for (Class<?> type : commands()) {
            for (CommandParameter parameter : parameters(type)) {
                if (parameter.name().equals("crystal")) {
                    boolean lists = type == FindZoneAxis.class
                            || type == IndexByHand.class
                            || SeriesCommand.class.isAssignableFrom(type);
                    assertEquals(lists ? withLists : crystals, parameter.choices());
                    found++;
                }
            }
        }
        assertEquals(9, found);
        Prefs.set(UserFolder.KEY, "");
    }

    @Test
    void commandsWithDots_askSomething() throws Exception {
        for (Class<?> type : commands()) {
            boolean asks = parameters(type).stream().anyMatch(CommandParameter::isAsked);
            assertEquals(asks, type.getAnnotation(Plugin.class).menuPath().endsWith("..."), type.getName());
        }
    }

    private static List<CommandParameter> parameters(Class<?> type) throws ReflectiveOperationException {
        return CommandParameter.of((Command) type.getConstructor().newInstance());
    }

    /** The class that each menu line launches, and its menu path. */
    private static Map<String, String> listed() throws IOException {
        Map<String, String> paths = new TreeMap<>();
        try (BufferedReader lines = new BufferedReader(
                new InputStreamReader(MenuTest.class.getResourceAsStream("/plugins.config"), StandardCharsets.UTF_8))) {
            for (String line = lines.readLine(); line != null; line = lines.readLine()) {
                if (line.isBlank() || line.startsWith("#")) {
                    continue;
                }
                Matcher parts = LINE.matcher(line);
                assertTrue(parts.matches(), line);
                paths.put(ROOT + parts.group(3), parts.group(1) + ">" + parts.group(2));
            }
        }
        return paths;
    }

    /** Every class of ours that carries SciJava's annotation. */
    private static List<Class<?>> commands() throws IOException, URISyntaxException {
        Path classes = Path.of(CommandRunner.class
                .getProtectionDomain()
                .getCodeSource()
                .getLocation()
                .toURI());
        try (Stream<Path> files = Files.walk(classes)) {
            List<Class<?>> found = new ArrayList<>();
            files.map(file -> classes.relativize(file).toString().replace('\\', '/'))
                    .filter(name -> name.startsWith(ROOT.replace('.', '/')) && name.endsWith(".class"))
                    .map(name ->
                            name.substring(0, name.length() - ".class".length()).replace('/', '.'))
                    .map(MenuTest::load)
                    .filter(type -> type.isAnnotationPresent(Plugin.class))
                    .forEach(found::add);
            return found;
        } catch (UncheckedIOException e) {
            throw e.getCause();
        }
    }

    private static Class<?> load(String name) {
        try {
            return Class.forName(name, false, MenuTest.class.getClassLoader());
        } catch (ClassNotFoundException e) {
            throw new IllegalStateException(e);
        }
    }
}
