package io.github.zonewright.imagej.command;

import io.github.zonewright.calibration.RingCalibration.Fitted;
import io.github.zonewright.calibration.RingShape;
import io.github.zonewright.image.Ellipse;
import io.github.zonewright.imagej.session.Figures;
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
        return fitted.standard().name() + ": camera constant " + Figures.of(fitted.constant(), " px·Å")
                + ", ellipse ratio " + Figures.of(new MeasuredValue(ellipse.ratio(), shape.ratioError()), "")
                + ", " + azimuth(shape)
                + ", centre x "
                + Figures.of(new MeasuredValue(ellipse.centre().x(), shape.centreErrorX()), " px")
                + ", y " + Figures.of(new MeasuredValue(ellipse.centre().y(), shape.centreErrorY()), " px")
                + "; " + fitted.rings().size() + " of "
                + (fitted.rings().size() + fitted.unexplained().size()) + " rings explained.";
    }

    private static String azimuth(RingShape shape) {
        return shape.azimuthError() < Math.PI / 2
                ? "azimuth of the long axis on the screen "
                        + Figures.degrees(new MeasuredValue(shape.ellipse().azimuth(), shape.azimuthError()))
                : "azimuth of the long axis not told";
    }
}
