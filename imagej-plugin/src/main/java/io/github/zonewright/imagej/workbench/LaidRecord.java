package io.github.zonewright.imagej.workbench;

import io.github.zonewright.imagej.session.PatternMove;
import io.github.zonewright.imagej.session.ScaleKind;
import io.github.zonewright.imagej.session.Sitting;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.util.List;

/** Records how a pattern came to lie where it is, as the command that lays it there. */
final class LaidRecord {
    private static final double ANGSTROMS_PER_NANOMETRE = 10;

    private LaidRecord() {}

    /** Records the step from one pattern to another: a move where that is all, and else the whole. */
    static void change(Placement before, Sitting now, String crystal) {
        Placement after = now.placement().orElseThrow();
        if (isMove(before, after)) {
            PatternHand.record(PatternMove.between(before, after));
        } else {
            whole(after, now, crystal);
        }
    }

    /** Records what the last change is taken back to: one of the solutions, or a pattern laid by hand. */
    static void back(Sitting now, String crystal) {
        int place = now.chosen().map(now.solutions()::indexOf).orElse(-1) + 1;
        if (place > 0) {
            Recording.of("Move Pattern...", List.of(option("solution", Integer.toString(place))));
        } else {
            now.placement().ifPresent(p -> whole(p, now, crystal));
        }
    }

    private static boolean isMove(Placement before, Placement after) {
        ZoneSetting a = before.setting();
        ZoneSetting b = after.setting();
        return before.crystal().equals(after.crystal())
                && a.zone().equals(b.zone())
                && a.reference().equals(b.reference());
    }

    private static void whole(Placement p, Sitting now, String crystal) {
        ZoneSetting setting = p.setting();
        Camera camera = p.camera();
        Recording.of(
                "Lay Computed Pattern...",
                List.of(
                        option("crystal", crystal),
                        option("kilovolts", p.beam().kilovolts()),
                        option("scalekind", ScaleKind.PIXELS.recorded()),
                        option("scale", camera.constant()),
                        option("zone", setting.zone().toString()),
                        option("reference", setting.reference().toString()),
                        option("rotation", Math.toDegrees(setting.rotation())),
                        option("leanx", Math.toDegrees(setting.leanX())),
                        option("leany", Math.toDegrees(setting.leanY())),
                        option(
                                "centre",
                                camera.centre().x() + ", " + camera.centre().y()),
                        option("mirrored", Boolean.toString(camera.mirrored())),
                        option("thickness", now.thickness() / ANGSTROMS_PER_NANOMETRE),
                        option("indices", Boolean.toString(now.labelled()))));
    }

    private static Recording.Option option(String name, double value) {
        return option(name, Double.toString(value));
    }

    private static Recording.Option option(String name, String value) {
        return new Recording.Option(name, value);
    }
}
