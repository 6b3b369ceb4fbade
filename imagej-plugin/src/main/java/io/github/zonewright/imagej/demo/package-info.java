/** The main job on the example pattern, from the first pixel to the kept record, in one run. */
package io.github.zonewright.imagej.demo;
