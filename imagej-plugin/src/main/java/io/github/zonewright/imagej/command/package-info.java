/** One SciJava command for each action; every one runs without a window. And the answers in words. */
package io.github.zonewright.imagej.command;
