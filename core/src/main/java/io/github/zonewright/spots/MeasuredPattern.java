package io.github.zonewright.spots;

import io.github.zonewright.image.GrayImage;
import io.github.zonewright.image.LevelMap;
import io.github.zonewright.image.Mask;
import io.github.zonewright.image.PixelPoint;
import io.github.zonewright.image.PointFilter;
import java.util.List;
import java.util.Optional;

/** All that was measured on one pattern. Immutable; every position is in pixels of the image as it was given. */
public final class MeasuredPattern {

    private final int width;
    private final int height;
    private final List<MeasuredSpot> spots;
    private final Optional<MeasuredSpot> directBeam;
    private final List<CentreCandidate> centres;
    private final Fields fields;

    /**
     * What the measurement keeps per pixel, on the image binned by a factor.
     *
     * @param binning pixels of the image per side of a pixel here
     * @param sigma width of the spots in pixels of the binned image
     * @param response the image filtered for spots
     * @param noise scatter of the response
     * @param background level of the background
     * @param hidden what the stop covers
     */
    record Fields(int binning, double sigma, GrayImage response, LevelMap noise, LevelMap background, Mask hidden) {}

    MeasuredPattern(
            int width,
            int height,
            List<MeasuredSpot> spots,
            Optional<MeasuredSpot> directBeam,
            List<CentreCandidate> centres,
            Fields fields) {
        this.width = width;
        this.height = height;
        this.spots = List.copyOf(spots);
        this.directBeam = directBeam;
        this.centres = List.copyOf(centres);
        this.fields = fields;
    }

    /**
     * The image's width.
     *
     * @return in pixels
     */
    public int width() {
        return width;
    }

    /**
     * The image's height.
     *
     * @return in pixels
     */
    public int height() {
        return height;
    }

    /**
     * The diffracted spots.
     *
     * @return without the direct beam, the most intense first
     */
    public List<MeasuredSpot> spots() {
        return spots;
    }

    /**
     * The direct beam.
     *
     * @return empty when it is hidden, outside the frame or not to be told from the spots
     */
    public Optional<MeasuredSpot> directBeam() {
        return directBeam;
    }

    /**
     * The likeliest centre.
     *
     * @return empty when nothing points to any
     */
    public Optional<PatternCentre> centre() {
        return centres.stream().findFirst().map(CentreCandidate::centre);
    }

    /**
     * The centres the pattern may have.
     *
     * @return the likeliest first
     */
    public List<CentreCandidate> centres() {
        return centres;
    }

    /**
     * The width of the spots.
     *
     * @return standard deviation of the Gaussian like which the spots fall to half their height, in pixels
     */
    public double spotSigma() {
        return fields.sigma * fields.binning;
    }

    /**
     * Whether nothing can be seen at a place: it is outside the frame or behind the beam stop.
     *
     * @param point any point
     * @return true when a spot there could not be seen
     */
    public boolean isHidden(PixelPoint point) {
        return point.x() < 0
                || point.y() < 0
                || point.x() >= width
                || point.y() >= height
                || fields.hidden.contains(binned(point));
    }

    /**
     * The pixels behind the beam stop.
     *
     * @return a mask of the whole image
     */
    public Mask hidden() {
        return fields.binning == 1 ? fields.hidden : fields.hidden.enlarged(fields.binning, width, height);
    }

    /**
     * The level of the background.
     *
     * @param point a point of the frame
     * @return its grey value
     */
    public double backgroundAt(PixelPoint point) {
        PixelPoint place = binned(point);
        return fields.background.at(place.x(), place.y());
    }

    /**
     * Measures the intensity at a place whether or not a spot was found there (forced photometry).
     *
     * @param point a point of the frame; outside, the nearest pixel answers
     * @return the filter's answer as an intensity, with its noise
     */
    public SpotResponse measureAt(PixelPoint point) {
        PixelPoint place = binned(point);
        double perSum = PointFilter.ofSigma(fields.sigma).responsePerSum() / (fields.binning * (double) fields.binning);
        return new SpotResponse(
                fields.response.interpolated(place) / perSum, fields.noise.at(place.x(), place.y()) / perSum);
    }

    private PixelPoint binned(PixelPoint point) {
        return new PixelPoint(point.x() / fields.binning, point.y() / fields.binning);
    }
}
