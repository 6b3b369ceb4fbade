/**
 * From measured spots to ranked and refined solutions.
 *
 * <p>A solution is an orientation of a crystal that explains measured spots. Its score is a log-likelihood ratio in nats
 * against the assumption that the spots lie where they lie by accident.
 */
package io.github.zonewright.indexing;
