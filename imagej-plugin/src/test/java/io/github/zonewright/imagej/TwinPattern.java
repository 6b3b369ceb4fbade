package io.github.zonewright.imagej;

import ij.ImagePlus;
import ij.process.Blitter;
import ij.process.ImageProcessor;
import io.github.zonewright.geometry.Rotation;
import io.github.zonewright.geometry.Vector3;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;

/** A {1 1 1} twin of copper seen along [1 1 0], which both crystals share: 60° about the normal of the twin plane. */
public final class TwinPattern {
    private TwinPattern() {}

    /** The second crystal: half a turn about the normal of (1 −1 1), which lies in the zone. */
    public static Placement second() {
        Placement first = TestPatterns.copper110();
        Rotation law = Rotation.ofAxisAngle(new Vector3(1, -1, 1), Math.PI);
        Orientation twin = new Orientation(first.orientation().rotation().after(law));
        Uvw zone = twin.nearestZone(first.crystal().lattice(), 3);
        Hkl reference = new Hkl(1, 1, 1).dot(zone) == 0 ? new Hkl(1, 1, 1) : new Hkl(1, -1, 1);
        return first.withSetting(ZoneSetting.of(twin, first.crystal().lattice(), zone, reference));
    }

    /** The image of both, the twin at half the height. */
    public static ImagePlus image() {
        ImageProcessor both = TestPatterns.pixels(TestPatterns.copper110());
        ImageProcessor twin = TestPatterns.pixels(second());
        twin.subtract(200);
        twin.multiply(0.5);
        both.copyBits(twin, 0, 0, Blitter.ADD);
        return new ImagePlus("copper-twin", both);
    }
}
