package io.github.zonewright.imagej.demo;

/** The main job on the demo pattern, as {@code mvn -Pdemo package} runs it. */
public final class Demo {
    private Demo() {}

    /**
     * Runs the demo. It writes into the folder named by the system property {@code demo.output} and opens a window
     * unless {@code demo.window} is false.
     *
     * @param arguments none
     */
    public static void main(String[] arguments) {
        System.out.println(
                "Zonewright: the demo is still to be written; it will use " + System.getProperty("demo.output"));
    }
}
