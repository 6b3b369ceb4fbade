package io.github.zonewright.pattern;

import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.Orientation;
import io.github.zonewright.orientation.ZoneSetting;

/**
 * A computed pattern laid over an image: which crystal, in which beam, how it sits, and how the camera saw it. It claims
 * nothing about the image; a solution does.
 *
 * @param crystal the crystal
 * @param beam the beam
 * @param setting zone axis, rotation and lean
 * @param camera centre, camera constant, ellipse, mirror
 */
public record Placement(Crystal crystal, Beam beam, ZoneSetting setting, Camera camera) {

    /**
     * The crystal's orientation.
     *
     * @return R of this setting
     */
    public Orientation orientation() {
        return setting.orientation(crystal.lattice());
    }

    /**
     * Turns the pattern about its centre.
     *
     * @param angle in radians, counter-clockwise in the microscope frame
     * @return the turned placement; the lean, which belongs to the microscope, stays
     */
    public Placement turnedBy(double angle) {
        double rotation = Math.IEEEremainder(setting.rotation() + angle, 2 * Math.PI);
        return withSetting(
                new ZoneSetting(setting.zone(), setting.reference(), rotation, setting.leanX(), setting.leanY()));
    }

    /**
     * Leans the zone axis.
     *
     * @param x lean towards X to add, in radians
     * @param y lean towards Y to add, in radians
     * @return the leaning placement
     */
    public Placement leanedBy(double x, double y) {
        return withSetting(new ZoneSetting(
                setting.zone(), setting.reference(), setting.rotation(), setting.leanX() + x, setting.leanY() + y));
    }

    /**
     * Moves the pattern.
     *
     * @param centre the new centre
     * @return the moved placement
     */
    public Placement centredAt(PixelPoint centre) {
        return withCamera(camera.withCentre(centre));
    }

    /**
     * Stretches the pattern.
     *
     * @param factor what the camera constant is multiplied by
     * @return the rescaled placement
     */
    public Placement scaledBy(double factor) {
        return withCamera(camera.withConstant(camera.constant() * factor));
    }

    /**
     * The same with another setting.
     *
     * @param other the setting
     * @return the changed placement
     */
    public Placement withSetting(ZoneSetting other) {
        return new Placement(crystal, beam, other, camera);
    }

    /**
     * The same with another camera.
     *
     * @param other the camera
     * @return the changed placement
     */
    public Placement withCamera(Camera other) {
        return new Placement(crystal, beam, setting, other);
    }

    /**
     * The largest scattering vector that still lands on an image.
     *
     * @param width image width in px
     * @param height image height in px
     * @return |g| of the corner farthest from the centre, in 1/Å
     */
    public double largestG(int width, int height) {
        double largest = 0;
        for (int corner = 0; corner < 4; corner++) {
            PixelPoint p = new PixelPoint((corner & 1) * width, (corner >> 1) * height);
            Vector2 g = camera.toReciprocal(p, beam.wavelength());
            largest = Math.max(largest, g.norm());
        }
        return largest;
    }
}
