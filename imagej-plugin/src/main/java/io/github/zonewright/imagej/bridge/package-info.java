/** Between ImageJ's images, calibrations and tables and the types of the library. Reads images, never writes to them. */
package io.github.zonewright.imagej.bridge;
