package io.github.zonewright;

import java.nio.file.Path;

/** The data that tests share, in the folder {@code testdata} at the top of the project. */
public final class TestData {
    private TestData() {}

    /**
     * A file or folder of the test data.
     *
     * @param name its name, such as {@code "cif/CsCl.cif"}
     * @return its path, wherever the tests are run from
     */
    public static Path path(String name) {
        Path module = Path.of(System.getProperty("basedir", "")).toAbsolutePath();
        return module.resolveSibling("testdata").resolve(name);
    }
}
