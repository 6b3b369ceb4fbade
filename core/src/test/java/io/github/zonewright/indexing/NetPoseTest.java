package io.github.zonewright.indexing;

import static org.junit.jupiter.api.Assertions.assertEquals;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.spots.MeasuredSpot;
import java.util.List;
import java.util.Random;
import org.junit.jupiter.api.Test;

class NetPoseTest {

    private static NetPose random(Random random) {
        double e = 0.02 * random.nextDouble();
        double azimuth = 2 * Math.PI * random.nextDouble();
        return new NetPose(
                100 + 50 * random.nextDouble(),
                -300 + 90 * random.nextDouble(),
                80 + 400 * random.nextDouble(),
                7 * random.nextDouble(),
                e * Math.cos(azimuth),
                e * Math.sin(azimuth));
    }

    @Test
    void toNet_anyPose_inverse() {
        Random random = new Random(1);
        for (int n = 0; n < 1000; n++) {
            NetPose pose = random(random);
            Vector2 q = new Vector2(2 * random.nextDouble() - 1, 2 * random.nextDouble() - 1);
            Vector2 back = pose.toNet(pose.x(q.x(), q.y()), pose.y(q.x(), q.y()));
            assertEquals(0, back.minus(q).norm(), 1e-12);
        }
    }

    /** The camera of the microscope package, turned by the rotation, puts every node at the same pixel. */
    @Test
    void pose_asCamera_samePixels() {
        Random random = new Random(2);
        for (int n = 0; n < 1000; n++) {
            NetPose pose = random(random);
            boolean mirrored = n % 2 == 1;
            SpotCloud cloud = new SpotCloud(List.of(), mirrored, 1e6);
            // (1 + e)(1 − e) is the square of the geometric mean.
            double e = Math.hypot(pose.e1(), pose.e2());
            Camera camera = new Camera(
                    cloud.toImage(pose.centreX(), pose.centreY()),
                    pose.constant() * Math.sqrt((1 + e) * (1 - e)),
                    pose.ellipseRatio(),
                    pose.ellipseAzimuth(),
                    mirrored);
            Vector2 q = new Vector2(2 * random.nextDouble() - 1, 2 * random.nextDouble() - 1);
            PixelPoint expected = camera.toPixel(q.rotate(pose.rotation()), 0);
            PixelPoint own = cloud.toImage(pose.x(q.x(), q.y()), pose.y(q.x(), q.y()));
            assertEquals(0, own.distanceTo(expected), 1e-9);
        }
    }

    /** Worked: K = 100, turned by 90°, q = (1, 0) lies 100 px above the centre in the microscope frame. */
    @Test
    void pose_quarterTurn_up() {
        NetPose pose = new NetPose(10, 20, 100, Math.PI / 2, 0, 0);
        assertEquals(10, pose.x(1, 0), 1e-12);
        assertEquals(120, pose.y(1, 0), 1e-12);
    }

    /** Worked: e1 = 0.01 stretches X by 1.01 and Y by 0.99: the ratio is 1.0202, its long axis along X. */
    @Test
    void ellipse_alongX_ratioAndAzimuth() {
        NetPose pose = new NetPose(0, 0, 100, 0, 0.01, 0);
        assertEquals(101, pose.x(1, 0), 1e-12);
        assertEquals(99, pose.y(0, 1), 1e-12);
        assertEquals(1.01 / 0.99, pose.ellipseRatio(), 1e-12);
        assertEquals(0, pose.ellipseAzimuth(), 1e-12);
        assertEquals(Math.PI / 4, new NetPose(0, 0, 100, 0, 0, 0.01).ellipseAzimuth(), 1e-12);
    }

    @Test
    void cloud_mirroredImage_turnedBack() {
        MeasuredSpot spot = new MeasuredSpot(new PixelPoint(30, 50), 0.1, 100, 20, false);
        SpotCloud plain = new SpotCloud(List.of(spot), false, 1e4);
        SpotCloud mirrored = new SpotCloud(List.of(spot), true, 1e4);
        assertEquals(30, plain.x(0), 0);
        assertEquals(-50, plain.y(0), 0);
        assertEquals(-30, mirrored.x(0), 0);
        assertEquals(-50, mirrored.y(0), 0);
        assertEquals(spot.position(), mirrored.toImage(mirrored.x(0), mirrored.y(0)));
    }

    /** Half of six neighbours in the circle through the sixth; never below that of the frame. */
    @Test
    void density_squareNet_halfTheCount() {
        List<MeasuredSpot> spots = new java.util.ArrayList<>();
        for (int i = 0; i < 49; i++) {
            spots.add(new MeasuredSpot(new PixelPoint(20 * (i % 7), 20 * (i / 7)), 0.1, 1, 9, false));
        }
        SpotCloud cloud = new SpotCloud(spots, false, 1e9);
        assertEquals(0.5 * 6 / (Math.PI * 2 * 20 * 20), cloud.density(24), 1e-12);
        SpotCloud far = new SpotCloud(spots.subList(0, 2), false, 1e4);
        assertEquals(4 / 1e4, far.density(0), 1e-12);
    }
}
