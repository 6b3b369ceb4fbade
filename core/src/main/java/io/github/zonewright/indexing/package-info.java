/**
 * From measured spots to ranked and refined solutions, and how sure they are.
 *
 * <p>A solution is an orientation of a crystal that explains measured spots. Its score is a log-likelihood ratio in nats
 * against the assumption that the spots lie where they lie by accident.
 *
 * <p>The way of a search: {@code ZoneCatalogue} lists the zone axes that differ, {@code ZoneNet} holds the reflections of one
 * of them; {@code NetVote} lets the spots vote for scale and rotation of each net about each likely centre; {@code
 * NetRanking} fits the best places ({@code NetFit}) and scores them by positions ({@code PositionScore}) and by intensities;
 * {@code Refinement} takes the first few to the end: {@code LeanFit} reads the lean of the zone axis from the envelope of the
 * intensities ({@code LeanGrid}, {@code IntensityLikelihood}, {@code EnvelopeShape}), {@code UpperLayers} decides by reflections of upper
 * layers between orientations half a turn apart and sharpens the lean, {@code PlacementFit} fits the exact orientation and
 * camera to all explained spots. {@code Verdict} says what may be concluded.
 *
 * <p>What comes after a first solution: {@code SpotOrigins} says where each spot may come from, {@code Leftovers} searches
 * what is left over for further crystals under the first one's camera ({@code GrainSearch}, {@code GrainModel}, {@code
 * GrainLean}), and {@code WhatTellsApart} compares answers that explain the same spots. By hand: {@code HandIndexing} lists
 * what clicked spots may be, and {@code LockedRefinement} refines what a person has not locked.
 */
package io.github.zonewright.indexing;
