package io.github.zonewright.indexing;

import io.github.zonewright.geometry.Vector2;

/**
 * How a zone's net lies on the image, in the microscope frame in px: p = centre + (I + E)·K·Rot(φ)·q, with q in 1/Å on a flat
 * detector and the symmetric traceless E = (e1 e2; e2 −e1) for the ellipse.
 */
record NetPose(double centreX, double centreY, double constant, double rotation, double e1, double e2) {

    double x(double qx, double qy) {
        double rx = constant * (Math.cos(rotation) * qx - Math.sin(rotation) * qy);
        double ry = constant * (Math.sin(rotation) * qx + Math.cos(rotation) * qy);
        return centreX + (1 + e1) * rx + e2 * ry;
    }

    double y(double qx, double qy) {
        double rx = constant * (Math.cos(rotation) * qx - Math.sin(rotation) * qy);
        double ry = constant * (Math.sin(rotation) * qx + Math.cos(rotation) * qy);
        return centreY + e2 * rx + (1 - e1) * ry;
    }

    /** The place of a pixel position in the net's plane, in 1/Å on a flat detector. */
    Vector2 toNet(double px, double py) {
        double dx = px - centreX;
        double dy = py - centreY;
        double det = 1 - e1 * e1 - e2 * e2;
        double rx = ((1 - e1) * dx - e2 * dy) / det;
        double ry = ((1 + e1) * dy - e2 * dx) / det;
        return new Vector2(rx, ry).rotate(-rotation).times(1 / constant);
    }

    NetPose movedBy(double dx, double dy) {
        return new NetPose(centreX + dx, centreY + dy, constant, rotation, e1, e2);
    }

    NetPose with(double otherConstant, double otherRotation) {
        return new NetPose(centreX, centreY, otherConstant, otherRotation, e1, e2);
    }

    /** Ratio of the long to the short axis of the ellipse. */
    double ellipseRatio() {
        double e = Math.hypot(e1, e2);
        return (1 + e) / (1 - e);
    }

    /** Azimuth of the long axis in radians. */
    double ellipseAzimuth() {
        return Math.atan2(e2, e1) / 2;
    }
}
