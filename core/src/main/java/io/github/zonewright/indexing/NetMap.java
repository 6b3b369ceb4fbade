package io.github.zonewright.indexing;

/**
 * A pose as the linear maps from net to image and back, worked out once for many places.
 *
 * @param centreX where the direct beam is, microscope frame, px
 * @param centreY the same
 * @param xx from x of the net, 1/Å on a flat detector, to x of the image
 * @param xy from y to x
 * @param yx from x to y
 * @param yy from y to y
 * @param perArea area of the net over area of the image
 */
record NetMap(double centreX, double centreY, double xx, double xy, double yx, double yy, double perArea) {

    static NetMap of(NetPose pose) {
        double c = pose.constant() * Math.cos(pose.rotation());
        double s = pose.constant() * Math.sin(pose.rotation());
        double xx = (1 + pose.e1()) * c + pose.e2() * s;
        double xy = pose.e2() * c - (1 + pose.e1()) * s;
        double yx = (1 - pose.e1()) * s + pose.e2() * c;
        double yy = (1 - pose.e1()) * c - pose.e2() * s;
        return new NetMap(pose.centreX(), pose.centreY(), xx, xy, yx, yy, 1 / (xx * yy - xy * yx));
    }

    double x(double qx, double qy) {
        return centreX + xx * qx + xy * qy;
    }

    double y(double qx, double qy) {
        return centreY + yx * qx + yy * qy;
    }

    double netX(double px, double py) {
        return (yy * (px - centreX) - xy * (py - centreY)) * perArea;
    }

    double netY(double px, double py) {
        return (xx * (py - centreY) - yx * (px - centreX)) * perArea;
    }
}
