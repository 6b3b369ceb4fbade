package io.github.zonewright.imagej.bridge;

import ij.measure.ResultsTable;
import io.github.zonewright.calibration.Calibration;
import io.github.zonewright.calibration.MicroscopeSetting;
import io.github.zonewright.spots.MeasuredValue;
import java.util.List;
import java.util.Optional;

/** Kept calibrations as an ImageJ table, under a title of its own so that the user's "Results" stay as they are. */
public final class CalibrationTable {
    private CalibrationTable() {}

    /**
     * One row for each calibration; what is not known is NaN.
     *
     * @param calibrations the calibrations
     * @return the table
     */
    public static ResultsTable of(List<Calibration> calibrations) {
        ResultsTable table = new ResultsTable();
        table.setPrecision(4);
        table.showRowNumbers(false);
        for (Calibration c : calibrations) {
            MicroscopeSetting setting = c.setting();
            table.addRow();
            table.addValue("name", c.name());
            table.addValue("instrument", setting.instrument());
            table.addValue("voltage (kV)", setting.kilovolts());
            table.addValue("camera length (mm)", setting.cameraLength().orElse(Double.NaN));
            table.addValue("pixel size (µm)", setting.pixelSize().orElse(Double.NaN));
            table.addValue("binning", setting.binning());
            table.addValue("camera constant (px·Å)", c.constant().value());
            table.addValue("camera constant su (px·Å)", c.constant().error());
            table.addValue("ellipse ratio", c.ellipseRatio().value());
            table.addValue(
                    "ellipse azimuth (°)", Math.toDegrees(c.ellipseAzimuth().value()));
            table.addValue("mirrored", c.mirrored() ? "yes" : "no");
            Optional<MeasuredValue> rotation = c.imageRotation();
            table.addValue(
                    "image rotation (°)",
                    rotation.map(r -> Math.toDegrees(r.value())).orElse(Double.NaN));
            table.addValue("standard", c.standard());
            table.addValue("date", c.date().toString());
        }
        return table;
    }
}
