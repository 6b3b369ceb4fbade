package io.github.zonewright.imagej.command;

import ij.ImagePlus;
import ij.WindowManager;
import io.github.zonewright.imagej.overlay.ShownMarks;
import io.github.zonewright.imagej.session.ImageView;
import io.github.zonewright.imagej.session.LengthUnit;
import io.github.zonewright.imagej.session.Sitting;
import java.util.EnumSet;
import java.util.Set;
import org.scijava.command.Command;
import org.scijava.plugin.Parameter;
import org.scijava.plugin.Plugin;

/** Says what is drawn about a pattern beyond its spots, and how the image beneath is looked at; no pixel changes. */
@Plugin(type = Command.class, menuPath = "Plugins>Zonewright>Show Marks...")
public final class ShowMarks extends PatternCommand {
    private static final String LAST = "as last";

    @Parameter(required = false, persist = false)
    private ImagePlus image;

    @Parameter(label = "Show indices", persist = false)
    private boolean indices;

    @Parameter(label = ShownMarks.LEGEND_LABEL, persist = false)
    private boolean legend;

    @Parameter(label = ShownMarks.SCALE_BAR_LABEL, persist = false)
    private boolean scalebar;

    @Parameter(label = ShownMarks.LAUE_CIRCLE_LABEL, persist = false)
    private boolean lauecircle;

    @Parameter(label = ShownMarks.DOUBLED_LABEL, persist = false)
    private boolean doublediffraction;

    @Parameter(
            label = ShownMarks.RESIDUALS_LABEL,
            description = "Enlarged arrows from each computed spot of the solution shown towards the measured one",
            persist = false)
    private boolean residuals;

    @Parameter(
            label = ShownMarks.SPLIT_LABEL,
            description = "The right half shows the computed pattern in place of the image",
            persist = false)
    private boolean computedhalf;

    @Parameter(
            label = "View",
            choices = {
                ImageView.AS_IT_IS_LABEL,
                ImageView.LOGARITHMIC_LABEL,
                ImageView.INVERTED_LABEL,
                ImageView.LOGARITHMIC_INVERTED_LABEL
            },
            persist = false)
    private String view = ImageView.AS_IT_IS_LABEL;

    @Parameter(
            label = "In place of the pattern",
            description = "Shows the measured spots in place of a pattern that lies over the image",
            persist = false)
    private boolean measured;

    @Parameter(
            label = "Lengths in",
            choices = {LAST, LengthUnit.ANGSTROM_LABEL, LengthUnit.NANOMETRE_LABEL},
            persist = false)
    private String lengths = LAST;

    /** For SciJava and the launcher. */
    public ShowMarks() {}

    @Override
    protected void perform() {
        ImagePlus over = image != null ? image : WindowManager.getCurrentImage();
        if (over == null) {
            throw new IllegalArgumentException("no image is open: open a diffraction pattern first");
        }
        if (!LAST.equals(lengths)) {
            LengthUnit.ofLabel(lengths).remember();
        }
        ImageView.ofLabel(view).show(over);
        Set<ShownMarks> shown = EnumSet.noneOf(ShownMarks.class);
        add(shown, ShownMarks.LEGEND, legend);
        add(shown, ShownMarks.SCALE_BAR, scalebar);
        add(shown, ShownMarks.LAUE_CIRCLE, lauecircle);
        add(shown, ShownMarks.DOUBLED, doublediffraction);
        add(shown, ShownMarks.RESIDUALS, residuals);
        add(shown, ShownMarks.SPLIT, computedhalf);
        ShownMarks.choose(shown, over);
        Sitting now = Sitting.of(over).withLabels(indices);
        now.withMeasurement(now.measurement().withShown(measured)).show(over);
    }

    private static void add(Set<ShownMarks> shown, ShownMarks mark, boolean wanted) {
        if (wanted) {
            shown.add(mark);
        }
    }
}
