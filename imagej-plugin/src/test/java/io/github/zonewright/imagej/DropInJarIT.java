package io.github.zonewright.imagej;

import static org.junit.jupiter.api.Assertions.assertDoesNotThrow;
import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import ij.IJ;
import java.io.File;
import java.io.IOException;
import java.io.InputStream;
import java.net.URL;
import java.net.URLClassLoader;
import java.nio.charset.StandardCharsets;
import java.nio.file.Files;
import java.nio.file.Path;
import java.util.List;
import java.util.Optional;
import java.util.Set;
import java.util.TreeSet;
import java.util.function.Predicate;
import java.util.jar.JarFile;
import java.util.regex.Matcher;
import java.util.regex.Pattern;
import java.util.zip.ZipEntry;
import org.junit.jupiter.api.Test;

/** Opens the jar that people drop into ImageJ's plugins folder, as the build has just made it. */
class DropInJarIT {
    private static final File DROP_IN = new File(System.getProperty("zonewright.dropin"));
    private static final File THIN = new File(System.getProperty("zonewright.thin"));
    private static final String INDEX = "META-INF/json/org.scijava.plugin.Plugin";

    /** What {@code Command}, {@code Plugin} and {@code Parameter} of scijava-common 2.100.1 refer to (read by javap). */
    private static final Set<String> SCIJAVA = Set.of(
            "org/scijava/Cancelable.class",
            "org/scijava/ItemIO.class",
            "org/scijava/ItemVisibility.class",
            "org/scijava/annotations/Indexable.class",
            "org/scijava/command/Command.class",
            "org/scijava/plugin/Attr.class",
            "org/scijava/plugin/Menu.class",
            "org/scijava/plugin/Parameter.class",
            "org/scijava/plugin/Plugin.class",
            "org/scijava/plugin/SciJavaPlugin.class");

    /** ImageJ reads menus only from jars with an underscore in their name (its manual, "Plugins"). */
    @Test
    void name_hasUnderscore() {
        assertTrue(DROP_IN.getName().startsWith("Zonewright_-"), DROP_IN.getName());
    }

    @Test
    void root_holdsPluginsConfigAndLicences() throws IOException {
        Set<String> entries = entries(DROP_IN, name -> true);
        for (String wanted : List.of(
                "plugins.config", "META-INF/LICENSE", "META-INF/NOTICE", "META-INF/LICENSE-scijava-common.txt")) {
            assertTrue(entries.contains(wanted), wanted);
        }
    }

    @Test
    void libraries_areRelocated() throws IOException {
        String shaded = "io/github/zonewright/shaded/";
        assertEquals(Set.of(), entries(DROP_IN, n -> n.startsWith("org/ejml/") || n.startsWith("pabeles/")));
        assertTrue(entries(DROP_IN, n -> true).contains(shaded + "org/ejml/data/DMatrixRMaj.class"));
        assertTrue(entries(DROP_IN, n -> true).contains(shaded + "pabeles/concurrency/ConcurrencyOps.class"));
    }

    @Test
    void classes_areOursAndScijavasMarkers() throws IOException {
        Set<String> foreign = entries(DROP_IN, n -> n.endsWith(".class") && !n.startsWith("io/github/zonewright/"));
        assertEquals(new TreeSet<>(SCIJAVA), foreign);
    }

    /** The index of SciJava's own plugins would make Fiji list every one of them twice. */
    @Test
    void index_listsOurCommandsAlone() throws IOException {
        Optional<String> thin = text(THIN, INDEX);
        assertEquals(thin, text(DROP_IN, INDEX));
        assertEquals(
                thin.isPresent() ? Set.of(INDEX) : Set.of(),
                entries(DROP_IN, n -> n.startsWith("META-INF/json/") && !n.endsWith("/")));
        Matcher listed = Pattern.compile("\"class\":\"([^\"]*)\"").matcher(thin.orElse(""));
        while (listed.find()) {
            assertTrue(listed.group(1).startsWith("io.github.zonewright.imagej."), listed.group(1));
        }
    }

    @Test
    void index_isThereWhenThereAreCommands() throws IOException {
        Path classes = Path.of(THIN.getParent(), "classes");
        boolean annotated = false;
        for (String entry : entries(THIN, n -> n.endsWith(".class"))) {
            String bytes = new String(Files.readAllBytes(classes.resolve(entry)), StandardCharsets.ISO_8859_1);
            annotated |= bytes.contains("Lorg/scijava/plugin/Plugin;");
        }
        assertEquals(annotated, text(THIN, INDEX).isPresent());
    }

    /** Plain ImageJ: nothing on the class path but its own jar and ours. */
    @Test
    void everyClass_loadsInPlainImageJ() throws Exception {
        URL imagej = IJ.class.getProtectionDomain().getCodeSource().getLocation();
        URL[] path = {imagej, DROP_IN.toURI().toURL()};
        try (URLClassLoader plain = new URLClassLoader(path, ClassLoader.getPlatformClassLoader())) {
            for (String entry : entries(DROP_IN, n -> n.startsWith("io/github/zonewright/imagej/"))) {
                if (entry.endsWith(".class")) {
                    String name = entry.substring(0, entry.length() - ".class".length());
                    Class<?> type = Class.forName(name.replace('/', '.'), false, plain);
                    assertDoesNotThrow(type::getDeclaredMethods, name);
                    assertDoesNotThrow(type::getDeclaredFields, name);
                }
            }
        }
    }

    private static Set<String> entries(File jar, Predicate<String> wanted) throws IOException {
        try (JarFile file = new JarFile(jar)) {
            Set<String> names = new TreeSet<>();
            file.stream().map(ZipEntry::getName).filter(wanted).forEach(names::add);
            return names;
        }
    }

    private static Optional<String> text(File jar, String entry) throws IOException {
        try (JarFile file = new JarFile(jar)) {
            ZipEntry found = file.getEntry(entry);
            if (found == null) {
                return Optional.empty();
            }
            try (InputStream in = file.getInputStream(found)) {
                return Optional.of(new String(in.readAllBytes(), StandardCharsets.UTF_8));
            }
        }
    }
}
