package io.github.zonewright.calibration;

import org.junit.jupiter.api.Test;

class RingFinderTest {

    @Test
    void find_ringsBehindStop_haveRadiiAndShape() {
        PowderImage powder = new PowderImage();
        long t0 = System.nanoTime();
        MeasuredRings found = RingFinder.withDefaults().find(powder.draw(1));
        System.out.println((System.nanoTime() - t0) / 1e9);
        found.rings().forEach(System.out::println);
        System.out.println(found.shape());
        for (double[] l : powder.lines) System.out.println(powder.radius(powder.a / Math.sqrt(l[0])));
    }
}
