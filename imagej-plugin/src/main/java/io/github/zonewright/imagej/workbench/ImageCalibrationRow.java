package io.github.zonewright.imagej.workbench;

import ij.ImagePlus;
import io.github.zonewright.imagej.bridge.ImageCalibration;
import io.github.zonewright.imagej.command.SetImageCalibration;
import java.util.List;
import java.util.Optional;
import java.util.function.Function;
import javax.swing.JButton;
import javax.swing.JLabel;

/** Sets the image's own calibration from what was found on it, and puts back what it was; never unasked. */
final class ImageCalibrationRow {
    private static final int NOTE_WIDTH = 460;

    private final JButton set = new JButton("Set image calibration");
    private final JButton back = new JButton("Put it back");
    private final JLabel note = Looks.quiet("");
    private Optional<ImagePlus> image = Optional.empty();

    ImageCalibrationRow() {
        for (JButton button : new JButton[] {set, back}) {
            button.setFont(Looks.text());
            button.setName(button.getText());
        }
        set.setToolTipText(
                "Gives the image the unit 1/nm with the camera constant of the solution shown or of the calibration");
        back.setToolTipText("Gives the image the calibration that it had before");
        note.setName("image calibration note");
        note.setVisible(false);
        set.addActionListener(e -> change(SetImageCalibration::setFromResult, SetImageCalibration.RESULT));
        back.addActionListener(e -> change(ImageCalibration::putBack, SetImageCalibration.BEFORE));
        show(Optional.empty());
    }

    JButton set() {
        return set;
    }

    JButton back() {
        return back;
    }

    JLabel note() {
        return note;
    }

    /** Offers what can be done with an image. */
    void show(Optional<ImagePlus> shown) {
        if (!shown.equals(image)) {
            say("");
        }
        image = shown;
        set.setEnabled(shown.flatMap(SetImageCalibration::found).isPresent());
        boolean done = shown.filter(ImageCalibration::wasSet).isPresent();
        set.setVisible(!done);
        back.setVisible(done);
    }

    private void change(Function<ImagePlus, String> how, String from) {
        image.ifPresent(i -> {
            try {
                note.setForeground(Looks.QUIET);
                say(how.apply(i));
                Recording.of("Set Image Calibration...", List.of(new Recording.Option("takefrom", from)));
            } catch (IllegalArgumentException e) {
                note.setForeground(Looks.WRONG);
                say(e.getMessage());
            }
            show(image);
        });
    }

    private void say(String sentence) {
        note.setText(sentence.isEmpty() ? "" : Looks.wrapped(sentence, NOTE_WIDTH));
        note.setVisible(!sentence.isEmpty());
    }
}
