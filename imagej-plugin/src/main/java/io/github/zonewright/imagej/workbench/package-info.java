/** The window beside the image and the mouse tool. They call what the commands call and add no science. */
package io.github.zonewright.imagej.workbench;
