/** One SciJava command for each action; every one runs without a window. */
package io.github.zonewright.imagej.command;
