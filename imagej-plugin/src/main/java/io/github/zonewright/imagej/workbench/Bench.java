package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.session.Sitting;
import java.util.Optional;
import java.util.function.UnaryOperator;

/** What the parts of the workbench share: the current image, what is known of it, and where to say something. */
interface Bench {
    /** The current image. */
    Optional<ImagePlus> image();

    /** Changes what is known of it, so that it can be taken back. */
    void change(UnaryOperator<Sitting> how);

    /** Keeps what is said of instrument and crystal with the current image. */
    void keepInstrument();

    /** Says a sentence for a person. */
    void say(String sentence);

    /** Shows everything anew. */
    void refresh();

    /** What is known of the current image. */
    default Sitting sitting() {
        return image().map(Sitting::of).orElse(Sitting.EMPTY);
    }
}
