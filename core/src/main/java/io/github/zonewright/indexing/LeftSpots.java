package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredPattern;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.List;

/** Spots that a solution leaves over, as places of the reciprocal plane under a camera that is held. */
final class LeftSpots {

    /** What the model leaves out, in px, and what the camera does, as a share of the radius. */
    private static final double MODEL_ERROR = 0.3;

    private static final double CAMERA_ERROR = 0.0015;

    private final MeasuredPattern pattern;
    private final List<MeasuredSpot> spots;
    private final List<PixelPoint> taken;
    private final Camera camera;
    private final double wavelength;
    private final Vector2[] places;

    LeftSpots(MeasuredPattern pattern, List<MeasuredSpot> spots, List<PixelPoint> taken, Camera camera, Beam beam) {
        this.pattern = pattern;
        this.spots = List.copyOf(spots);
        this.taken = List.copyOf(taken);
        this.camera = camera;
        this.wavelength = beam.wavelength();
        this.places = this.spots.stream()
                .map(s -> camera.toReciprocal(s.position(), wavelength))
                .toArray(Vector2[]::new);
    }

    int size() {
        return places.length;
    }

    MeasuredSpot spot(int i) {
        return spots.get(i);
    }

    /** (gX, gY) in 1/Å. */
    Vector2 place(int i) {
        return places[i];
    }

    /** Standard deviation of each coordinate about a node, in 1/Å. */
    double error(int i) {
        return error(spots.get(i), camera);
    }

    /** Standard deviation of each coordinate of a spot about a node under a camera that is held, in 1/Å. */
    static double error(MeasuredSpot spot, Camera camera) {
        double r = spot.position().distanceTo(camera.centre());
        return Math.hypot(Math.hypot(spot.positionError(), MODEL_ERROR), CAMERA_ERROR * r) / camera.constant();
    }

    /** The area in which a spot can be left over, in 1/Å². */
    double area() {
        return pattern.width() * (double) pattern.height() / (camera.constant() * camera.constant());
    }

    /** Whether a spot at a place would be left over: it is in sight and not on one that is taken. */
    boolean couldBeLeft(Vector2 g) {
        PixelPoint p = camera.toPixel(g, wavelength);
        if (pattern.isHidden(p)) {
            return false;
        }
        double near = Math.max(3, 2.5 * pattern.spotSigma());
        return p.distanceTo(camera.centre()) > near && taken.stream().noneMatch(t -> t.distanceTo(p) < near);
    }

    /** The largest |g| that still lands on the frame, in 1/Å. */
    double largestG() {
        double largest = 0;
        for (int corner = 0; corner < 4; corner++) {
            PixelPoint p = new PixelPoint((corner & 1) * pattern.width(), (corner >> 1) * pattern.height());
            largest = Math.max(largest, camera.toReciprocal(p, wavelength).norm());
        }
        return largest;
    }

    double wavelength() {
        return wavelength;
    }
}
