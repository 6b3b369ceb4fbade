package io.github.zonewright.imagej;

import static org.junit.jupiter.api.Assertions.assertEquals;
import static org.junit.jupiter.api.Assertions.assertTrue;

import java.io.DataInputStream;
import java.io.IOException;
import org.junit.jupiter.api.Test;
import org.junit.jupiter.params.ParameterizedTest;
import org.junit.jupiter.params.provider.CsvSource;

class LaunchTest {
    @ParameterizedTest
    @CsvSource({"1.6, 6", "1.8, 8", "9, 9", "11, 11", "17, 17", "21, 21"})
    void featureVersion_bothNumberings(String specification, int feature) {
        assertEquals(feature, Launch.featureVersion(specification));
    }

    @Test
    void javaTooOld_namesBothVersions() {
        String message = Launch.javaTooOld("1.8");
        assertTrue(message.contains("Java 17") && message.contains("Java 1.8"), message);
    }

    /** The Java Virtual Machine Specification, table 4.1-A: class files of Java SE 8 have major version 52. */
    @Test
    void classFile_loadsInJava8() throws IOException {
        try (DataInputStream in = new DataInputStream(Launch.class.getResourceAsStream("Launch.class"))) {
            assertEquals(0xCAFEBABE, in.readInt());
            in.readUnsignedShort();
            assertEquals(52, in.readUnsignedShort());
        }
    }
}
