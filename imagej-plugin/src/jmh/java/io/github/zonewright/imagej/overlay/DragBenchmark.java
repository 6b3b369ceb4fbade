package io.github.zonewright.imagej.overlay;

import ij.ImagePlus;
import ij.gui.ImageCanvas;
import ij.process.ShortProcessor;
import io.github.zonewright.crystal.Crystal;
import io.github.zonewright.crystal.CrystalShelf;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.lattice.Hkl;
import io.github.zonewright.lattice.Uvw;
import io.github.zonewright.microscope.Beam;
import io.github.zonewright.microscope.Camera;
import io.github.zonewright.orientation.ZoneSetting;
import io.github.zonewright.pattern.Placement;
import java.awt.Graphics;
import java.awt.Image;
import java.awt.Rectangle;
import java.awt.image.BufferedImage;
import java.util.List;
import java.util.Optional;
import java.util.Random;
import java.util.concurrent.TimeUnit;
import java.util.stream.IntStream;
import org.openjdk.jmh.annotations.Benchmark;
import org.openjdk.jmh.annotations.BenchmarkMode;
import org.openjdk.jmh.annotations.Mode;
import org.openjdk.jmh.annotations.OutputTimeUnit;
import org.openjdk.jmh.annotations.Param;
import org.openjdk.jmh.annotations.Scope;
import org.openjdk.jmh.annotations.Setup;
import org.openjdk.jmh.annotations.State;

/**
 * Repainting while a pattern is dragged against ImageJ's own repaint of the same canvas without any mark, both into a picture of
 * 1024 × 1024 px in place of the screen. {@code drag} over {@code bareRepaint} is the ratio to look at; {@code follow} is the
 * time to compute the pattern of the next step of a tilt.
 */
@State(Scope.Benchmark)
@BenchmarkMode(Mode.AverageTime)
@OutputTimeUnit(TimeUnit.MICROSECONDS)
public class DragBenchmark {
    private static final int SCREEN = 1024;
    private static final int STEPS = 16;
    private static final double THICKNESS = 500;

    /** Side of the image in px. */
    @Param({"1024", "4096"})
    private int side;

    /** Screen px for each px of the image, in %; 0 to see all of it. */
    @Param({"0", "100", "300"})
    private int zoom;

    /** How many computed spots are on the image, at least. */
    @Param({"60", "500"})
    private int spots;

    /** Whether spots carry their indices. */
    @Param({"false", "true"})
    private boolean indices;

    private ImageCanvas canvas;
    private Graphics screen;
    private ImagePlus image;
    private ViewMaker views;
    private List<PatternView> turned;
    private Placement placement;
    private int step;

    /** Lays the pattern over an image of noise. */
    @Setup
    public void lay() {
        Random noise = new Random(1);
        short[] grey = new short[side * side];
        for (int i = 0; i < grey.length; i++) {
            grey[i] = (short) (200 + noise.nextInt(400));
        }
        BufferedImage picture = new BufferedImage(SCREEN, SCREEN, BufferedImage.TYPE_INT_RGB);
        screen = picture.createGraphics();
        image = new ImagePlus("drag", new ShortProcessor(side, side, grey, null)) {
            @Override
            public ImageCanvas getCanvas() {
                return canvas;
            }
        };
        canvas = new OnPicture(image, picture);
        double seen = zoom == 0 ? side : SCREEN * 100.0 / zoom;
        int corner = (int) (side - seen) / 2;
        canvas.setSize(SCREEN, SCREEN);
        canvas.setSourceRect(new Rectangle(corner, corner, (int) seen, (int) seen));
        views = new ViewMaker(side, side);
        placement = placement();
        turned = IntStream.range(0, STEPS)
                .mapToObj(i -> view(placement.turnedBy(0.01 * i)))
                .toList();
    }

    private Placement placement() {
        Crystal crystal = CrystalShelf.find("Alpha manganese").orElseThrow();
        ZoneSetting setting = ZoneSetting.onZone(new Uvw(0, 0, 1), new Hkl(1, 0, 0), 0.3);
        PixelPoint centre = new PixelPoint(0.5 * side + 0.3, 0.5 * side - 0.2);
        Placement laid = new Placement(crystal, Beam.ofKilovolts(300), setting, Camera.of(centre, side, false));
        while (view(laid).computed().size() < spots) {
            laid = laid.scaledBy(0.98);
        }
        return laid;
    }

    private PatternView view(Placement laid) {
        return views.ofPlacement(laid, Optional.empty(), THICKNESS, indices);
    }

    /** ImageJ's own repaint. */
    @Benchmark
    public void bareRepaint() {
        canvas.paint(screen);
    }

    /** A step of a turn. */
    @Benchmark
    public void drag() {
        PatternOverlay.sketch(image, turned.get(step++ % STEPS), "step");
    }

    /**
     * A step of a tilt, there and back, computed and not drawn.
     *
     * @return what is to be drawn
     */
    @Benchmark
    public PatternView follow() {
        double lean = 0.02 * Math.sin(0.05 * step++);
        return view(placement.leanedBy(lean, 0));
    }

    /** A canvas that shows itself on a picture, for want of a screen. */
    private static final class OnPicture extends ImageCanvas {
        private static final long serialVersionUID = 1L;
        private final transient BufferedImage picture;

        OnPicture(ImagePlus image, BufferedImage picture) {
            super(image);
            this.picture = picture;
        }

        @Override
        public Graphics getGraphics() {
            return picture.createGraphics();
        }

        @Override
        public Image createImage(int width, int height) {
            return new BufferedImage(width, height, BufferedImage.TYPE_INT_RGB);
        }
    }
}
