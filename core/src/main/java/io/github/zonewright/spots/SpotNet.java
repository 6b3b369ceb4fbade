package io.github.zonewright.spots;

import io.github.zonewright.geometry.Vector2;
import io.github.zonewright.image.PixelPoint;
import java.util.List;
import java.util.Optional;

/**
 * The order in measured spots before any crystal is known: a net, a row, or none. Found by {@link SpotNetFinder}.
 *
 * <p>Vectors are in pixels of the image, y down as {@link PixelPoint#minus} gives them; azimuths are counter-clockwise on the
 * screen, from the right.
 */
public sealed interface SpotNet {

    /**
     * A spot of the net, and which node it is.
     *
     * @param spot the spot
     * @param n1 first index; on a row the order
     * @param n2 second index; 0 on a row
     * @param residual distance from the node in pixels
     */
    record Node(MeasuredSpot spot, int n1, int n2, double residual) {}

    /**
     * A two-dimensional net: spots at centre + n1·a + n2·b.
     *
     * @param centre node (0, 0), where the direct beam is or would be, behind a stop or beyond the frame too
     * @param a shortest vector of the net
     * @param b shortest vector not along a, at 60° to 90° from it
     * @param covariance of a component of centre, a and b (3 × 3, in px²), the same for x and y
     * @param nodes the spots on the net
     * @param strays the spots off it: of another grain or a twin, of higher layers, or none at all
     * @param rms root mean square of the residuals in pixels
     */
    record Net(
            PatternCentre centre,
            Vector2 a,
            Vector2 b,
            List<List<Double>> covariance,
            List<Node> nodes,
            List<MeasuredSpot> strays,
            double rms)
            implements SpotNet {

        /** Copies the lists. */
        public Net {
            covariance = covariance.stream().map(List::copyOf).toList();
            nodes = List.copyOf(nodes);
            strays = List.copyOf(strays);
        }

        /**
         * The length of a.
         *
         * @return in pixels
         */
        public MeasuredValue lengthA() {
            return new MeasuredValue(a.norm(), Math.sqrt(covariance.get(1).get(1)));
        }

        /**
         * The length of b.
         *
         * @return in pixels
         */
        public MeasuredValue lengthB() {
            return new MeasuredValue(b.norm(), Math.sqrt(covariance.get(2).get(2)));
        }

        /**
         * The ratio of the lengths.
         *
         * @return |b| / |a|, at least 1 but for rounding
         */
        public MeasuredValue ratio() {
            double ratio = b.norm() / a.norm();
            return new MeasuredValue(ratio, ratio * Math.sqrt(relativeVariance()));
        }

        /**
         * The angle between a and b.
         *
         * @return in radians, π/3 to π/2
         */
        public MeasuredValue angle() {
            double angle = Math.atan2(Math.abs(a.cross(b)), a.dot(b));
            return new MeasuredValue(angle, Math.sqrt(relativeVariance()));
        }

        /**
         * The place of a node.
         *
         * @param n1 first index
         * @param n2 second index
         * @return the place on the image
         */
        public PixelPoint at(int n1, int n2) {
            return centre.position().plus(a.times(n1)).plus(b.times(n2));
        }

        /** Variance of the logarithm of |b|/|a|, and that of the angle as well, since the errors are round. */
        private double relativeVariance() {
            double lengthA = a.norm();
            double lengthB = b.norm();
            double cos = a.dot(b) / (lengthA * lengthB);
            return Math.max(
                    0,
                    covariance.get(1).get(1) / (lengthA * lengthA)
                            + covariance.get(2).get(2) / (lengthB * lengthB)
                            - 2 * cos * covariance.get(1).get(2) / (lengthA * lengthB));
        }
    }

    /**
     * A systematic row: spots at centre + n·a. Nothing is known across it.
     *
     * @param centre order 0; where no centre was given and none shows, one of the spots
     * @param step from one order to the next
     * @param stepError standard uncertainty of each component of the step, in pixels
     * @param nodes the spots on the row
     * @param strays the spots off it
     * @param rms root mean square of the residuals in pixels
     */
    record SystematicRow(
            PatternCentre centre,
            Vector2 step,
            double stepError,
            List<Node> nodes,
            List<MeasuredSpot> strays,
            double rms)
            implements SpotNet {

        /** Copies the lists. */
        public SystematicRow {
            nodes = List.copyOf(nodes);
            strays = List.copyOf(strays);
        }

        /**
         * The spacing of the spots.
         *
         * @return in pixels
         */
        public MeasuredValue spacing() {
            return new MeasuredValue(step.norm(), stepError);
        }

        /**
         * The direction of the row on the screen.
         *
         * @return in radians, counter-clockwise from the right, from −π/2 to π/2
         */
        public MeasuredValue azimuth() {
            double azimuth = Math.atan2(-step.y(), step.x());
            double half =
                    azimuth > Math.PI / 2 ? azimuth - Math.PI : azimuth <= -Math.PI / 2 ? azimuth + Math.PI : azimuth;
            return new MeasuredValue(half, stepError / step.norm());
        }
    }

    /**
     * No order.
     *
     * @param reason a sentence for the user
     */
    record NoNet(String reason) implements SpotNet {}

    /**
     * The spots off the net.
     *
     * @return the strays; empty when there is no net
     */
    default List<MeasuredSpot> offNet() {
        if (this instanceof Net net) {
            return net.strays();
        }
        return this instanceof SystematicRow row ? row.strays() : List.of();
    }

    /**
     * The centre as the net has it.
     *
     * @return empty when there is no net
     */
    default Optional<PatternCentre> refinedCentre() {
        if (this instanceof Net net) {
            return Optional.of(net.centre());
        }
        return this instanceof SystematicRow row ? Optional.of(row.centre()) : Optional.empty();
    }
}
