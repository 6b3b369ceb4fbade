package io.github.zonewright.imagej.workbench;

import static org.junit.jupiter.api.Assertions.assertThrows;

import org.junit.jupiter.api.Test;

/** The alarm that the walks rely on hears what it should. */
class AlarmTest {
    @Test
    void quiet_isQuiet() {
        try (Alarm alarm = new Alarm()) {
            System.err.println("a plain remark");
            alarm.assertQuiet("nothing happened");
        }
    }

    @Test
    void endOfAThread_isHeard() throws InterruptedException {
        try (Alarm alarm = new Alarm()) {
            Thread thread = new Thread(() -> {
                throw new IllegalStateException("on purpose");
            });
            thread.start();
            thread.join();
            assertThrows(AssertionError.class, () -> alarm.assertQuiet("thread"));
        }
    }

    @Test
    void stackTrace_isHeard() {
        try (Alarm alarm = new Alarm()) {
            System.err.println("\tat somewhere.Some.where(Some.java:1)");
            assertThrows(AssertionError.class, () -> alarm.assertQuiet("stack trace"));
        }
    }
}
