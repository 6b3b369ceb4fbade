/** What is measured on a spot pattern: the spots, the centre, what is hidden, and how well each is known. */
package io.github.zonewright.spots;
