package io.github.zonewright.imagej.command;

import io.github.zonewright.calibration.RingCalibration.Fitted;
import io.github.zonewright.calibration.RingShape;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.spots.MeasuredValue;

/** What rings say of the camera, in words and numbers for a person: px·Å, px and degrees with standard uncertainties. */
public final class RingAnswer {
    private RingAnswer() {}

    /**
     * One line: camera constant, ellipse and centre.
     *
     * @param fitted the calibration
     * @return the line
     */
    public static String line(Fitted fitted) {
        RingShape shape = fitted.shape();
        Ellipse ellipse = shape.ellipse();
        return fitted.standard().name() + ": camera constant " + NetAnswer.number(fitted.constant(), 3, " px·Å")
                + ", ellipse ratio " + NetAnswer.number(new MeasuredValue(ellipse.ratio(), shape.ratioError()), 5, "")
                + ", " + azimuth(shape)
                + ", centre x "
                + NetAnswer.number(new MeasuredValue(ellipse.centre().x(), shape.centreErrorX()), 3, " px")
                + ", y " + NetAnswer.number(new MeasuredValue(ellipse.centre().y(), shape.centreErrorY()), 3, " px")
                + "; " + fitted.rings().size() + " of "
                + (fitted.rings().size() + fitted.unexplained().size()) + " rings explained.";
    }

    private static String azimuth(RingShape shape) {
        return shape.azimuthError() < Math.PI / 2
                ? "azimuth of the long axis on the screen "
                        + NetAnswer.degrees(new MeasuredValue(shape.ellipse().azimuth(), shape.azimuthError()))
                : "azimuth of the long axis not told";
    }
}
