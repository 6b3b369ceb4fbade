/** Vectors, matrices and rotations of plane and space; no physics. */
package io.github.zonewright.geometry;
