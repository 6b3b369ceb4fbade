/**
 * Answers kept as files of open standards: a fit or a calibration as a CIF, spots as a CSV table.
 *
 * <p>A fit's record is one data block in a file of CIF 1.1 (CIF 2.0 where a text in it is not ASCII). Names of the core
 * dictionary of the International Union of Crystallography stand for what they stand for there; what the dictionary has no
 * name for has the prefix {@code _zonewright_}. Numbers have all the digits it takes to read back the same
 * {@code double}, angles as {@link io.github.zonewright.cif.CifDegrees} describes; uncertainties stand in items of their
 * own. {@code ?} is a number that is not known, {@code .} one without a finite value.
 *
 * <p>From the core dictionary: the crystal as {@link io.github.zonewright.crystal.CrystalCif} writes it;
 * {@code _diffrn_source_voltage}, {@code _diffrn_radiation_probe}, {@code _diffrn_radiation_wavelength};
 * {@code _diffrn_orient_matrix_type}, {@code _diffrn_orient_matrix_UB_11} to {@code _33};
 * {@code _diffrn_refln_index_h}, {@code _k}, {@code _l} and {@code _diffrn_refln_intensity_net} (grey values above the
 * background) of explained spots; {@code _audit_creation_date}, {@code _computing_data_reduction}.
 *
 * <p>Wavelength, UB and counts follow from other items. They are there for other readers, and a record in which they
 * contradict those is refused.
 *
 * <table>
 * <caption>Items of our own</caption>
 * <tr><th>item</th><th>unit or values</th><th>meaning</th></tr>
 * <tr><td>{@code _zonewright_record_type}</td><td>fit, alternative, grain</td><td>what the block records; alternative:
 *     another solution of the search that the fit comes from, with the fit's crystal where it has none of its own; grain: a
 *     further crystal in what the fit leaves over, likewise</td></tr>
 * <tr><td>{@code _zonewright_record_version}</td><td>1</td><td>version of this list of items</td></tr>
 * <tr><td>{@code _zonewright_image_file_name}</td><td></td><td>name of the image's file, without folders</td></tr>
 * <tr><td>{@code _zonewright_image_width}</td><td>px</td><td>width of the image</td></tr>
 * <tr><td>{@code _zonewright_image_height}</td><td>px</td><td>height of the image</td></tr>
 * <tr><td>{@code _zonewright_image_sha256}</td><td>64 hexadecimal digits</td><td>SHA-256 of the pixels: row by row from
 *     the top, left to right, each as stored, most significant byte first</td></tr>
 * <tr><td>{@code _zonewright_crystal_notice}</td><td></td><td>in a loop: what was doubtful in the file that the crystal came
 *     from, and what was done about it</td></tr>
 * <tr><td>{@code _zonewright_zone_axis_u}</td><td></td><td>zone axis [uvw], from the specimen towards the source</td></tr>
 * <tr><td>{@code _zonewright_zone_axis_v}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_zone_axis_w}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_reference_index_h}</td><td></td><td>reflection of the zone that the rotation refers to</td></tr>
 * <tr><td>{@code _zonewright_reference_index_k}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_reference_index_l}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_rotation}</td><td>degrees</td><td>azimuth of the reference reflection before the lean,
 *     counter-clockwise from X</td></tr>
 * <tr><td>{@code _zonewright_lean_x}</td><td>degrees</td><td>lean of the zone axis from Z towards X</td></tr>
 * <tr><td>{@code _zonewright_lean_y}</td><td>degrees</td><td>lean of the zone axis from Z towards Y</td></tr>
 * <tr><td>{@code _zonewright_camera_centre_x}</td><td>px</td><td>where the direct beam meets the image, from its left
 *     edge</td></tr>
 * <tr><td>{@code _zonewright_camera_centre_y}</td><td>px</td><td>the same, down from its top edge</td></tr>
 * <tr><td>{@code _zonewright_camera_constant}</td><td>px Å</td><td>camera constant: distance on the image over |g| = 1/d
 *     for small |g|</td></tr>
 * <tr><td>{@code _zonewright_camera_ellipse_ratio}</td><td></td><td>long axis over short axis of what ought to be a
 *     circle</td></tr>
 * <tr><td>{@code _zonewright_camera_ellipse_azimuth}</td><td>degrees</td><td>azimuth of the long axis,
 *     counter-clockwise from X</td></tr>
 * <tr><td>{@code _zonewright_camera_mirrored}</td><td>yes, no</td><td>whether X points to the left on the image</td></tr>
 * <tr><td>{@code _zonewright_fit_state}</td><td>solution, placement</td><td>whether a fit stands behind the pattern, or it
 *     was only laid there; in the latter case there is none of the items below but the cautions</td></tr>
 * <tr><td>{@code _zonewright_fit_rms_residual}</td><td>px</td><td>root of the mean squared distance between measured and
 *     computed places</td></tr>
 * <tr><td>{@code _zonewright_fit_score}</td><td>nats</td><td>log-likelihood ratio against chance</td></tr>
 * <tr><td>{@code _zonewright_fit_own_score}</td><td>nats</td><td>what speaks for this crystal against
 *     any other with a net as near by accident, where it was looked at</td></tr>
 * <tr><td>{@code _zonewright_fit_spots_explained}</td><td></td><td>number of explained spots</td></tr>
 * <tr><td>{@code _zonewright_fit_spots_unexplained}</td><td></td><td>number of spots left over</td></tr>
 * <tr><td>{@code _zonewright_rotation_su}</td><td>degrees</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_lean_x_su}</td><td>degrees</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_lean_y_su}</td><td>degrees</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_camera_centre_x_su}</td><td>px</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_camera_centre_y_su}</td><td>px</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_camera_constant_su}</td><td>px Å</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_half_turn_quaternion_w}</td><td></td><td>orientation half a turn about the zone axis away
 *     that explains the same spots, as the unit quaternion w + xi + yj + zk of R; absent when there is none</td></tr>
 * <tr><td>{@code _zonewright_half_turn_quaternion_x}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_half_turn_quaternion_y}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_half_turn_quaternion_z}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_refln_measured_x}</td><td>px</td><td>in the loop of explained spots: measured place</td></tr>
 * <tr><td>{@code _zonewright_refln_measured_y}</td><td>px</td><td></td></tr>
 * <tr><td>{@code _zonewright_refln_measured_su}</td><td>px</td><td>standard uncertainty of either coordinate</td></tr>
 * <tr><td>{@code _zonewright_refln_computed_x}</td><td>px</td><td>computed place</td></tr>
 * <tr><td>{@code _zonewright_refln_computed_y}</td><td>px</td><td></td></tr>
 * <tr><td>{@code _zonewright_refln_signal_to_noise}</td><td></td><td>response of the spot filter over its scatter</td></tr>
 * <tr><td>{@code _zonewright_refln_saturated}</td><td>yes, no</td><td>whether the intensity is a lower bound</td></tr>
 * <tr><td>{@code _zonewright_unexplained_x}</td><td>px</td><td>in the loop of spots left over: measured place</td></tr>
 * <tr><td>{@code _zonewright_unexplained_y}</td><td>px</td><td></td></tr>
 * <tr><td>{@code _zonewright_unexplained_su}</td><td>px</td><td>standard uncertainty of either coordinate</td></tr>
 * <tr><td>{@code _zonewright_unexplained_intensity_net}</td><td>grey values</td><td>intensity above the background</td></tr>
 * <tr><td>{@code _zonewright_unexplained_signal_to_noise}</td><td></td><td>as for explained spots</td></tr>
 * <tr><td>{@code _zonewright_unexplained_saturated}</td><td>yes, no</td><td>as for explained spots</td></tr>
 * <tr><td>{@code _zonewright_fit_remark}</td><td></td><td>sentences on what the spots do not tell apart, and on an
 *     uncertain lean</td></tr>
 * <tr><td>{@code _zonewright_apart_other}</td><td></td><td>another answer that the fit was told apart from, in words</td></tr>
 * <tr><td>{@code _zonewright_apart_details}</td><td></td><td>sentences: why both explain the same spots, the spot to look
 *     for, the tilt with its cautions</td></tr>
 * <tr><td>{@code _zonewright_apart_tilt_x}</td><td>degrees</td><td>rotation of the specimen in the microscope frame after
 *     which the two differ plainly: the part of its vector (axis times angle, right-handed) along X</td></tr>
 * <tr><td>{@code _zonewright_apart_tilt_y}</td><td>degrees</td><td>the part along Y</td></tr>
 * <tr><td>{@code _zonewright_telling_index_h}</td><td></td><td>in a loop of spots that one of the two expects: its
 *     reflection, as that answer counts</td></tr>
 * <tr><td>{@code _zonewright_telling_index_k}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_telling_index_l}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_telling_of}</td><td>fit, other</td><td>the answer that expects it</td></tr>
 * <tr><td>{@code _zonewright_telling_x}</td><td>px</td><td>where it is expected</td></tr>
 * <tr><td>{@code _zonewright_telling_y}</td><td>px</td><td></td></tr>
 * <tr><td>{@code _zonewright_telling_strength}</td><td></td><td>its intensity over that of the strongest spot of its
 *     pattern</td></tr>
 * <tr><td>{@code _zonewright_telling_strength_other}</td><td></td><td>what the other answer expects there, likewise</td></tr>
 * <tr><td>{@code _zonewright_telling_sight}</td><td>seen, not_seen, hidden, outside</td><td>what the image shows there</td></tr>
 * <tr><td>{@code _zonewright_foil_thickness}</td><td>Å</td><td>foil thickness that the shown intensities are computed
 *     for</td></tr>
 * <tr><td>{@code _zonewright_spots_dark}</td><td>yes, no</td><td>whether spots are dark on bright ground, where a person said
 *     so</td></tr>
 * <tr><td>{@code _zonewright_hidden_pixels}</td><td></td><td>number of pixels of the hidden area, where a person set it</td></tr>
 * <tr><td>{@code _zonewright_hidden_row}</td><td>px</td><td>in a loop of the pieces of rows that make that area: the row,
 *     counted from 0 at the top</td></tr>
 * <tr><td>{@code _zonewright_hidden_first_column}</td><td>px</td><td>the first column of the piece, counted from 0 at the
 *     left</td></tr>
 * <tr><td>{@code _zonewright_hidden_last_column}</td><td>px</td><td>its last column</td></tr>
 * <tr><td>{@code _zonewright_edit_way}</td><td>add, move, remove, centre, find_centre</td><td>in a loop of what a person
 *     changed of the measured spots, in order: a spot added at the peak near a place, moved or removed; the centre set on
 *     the direct beam near a place, or at it; the centre found again</td></tr>
 * <tr><td>{@code _zonewright_edit_x}</td><td>px</td><td>the place</td></tr>
 * <tr><td>{@code _zonewright_edit_y}</td><td>px</td><td></td></tr>
 * <tr><td>{@code _zonewright_edit_to_x}</td><td>px</td><td>the place that a spot is moved to</td></tr>
 * <tr><td>{@code _zonewright_edit_to_y}</td><td>px</td><td></td></tr>
 * <tr><td>{@code _zonewright_shown_mark}</td><td></td><td>in a loop: what is drawn on the image beside the spots</td></tr>
 * <tr><td>{@code _zonewright_caution_code}</td><td>hand_assumed, half_turn</td><td>what the record cannot know; written for
 *     people, not read back</td></tr>
 * <tr><td>{@code _zonewright_caution_details}</td><td></td><td>the same in a sentence</td></tr>
 * </table>
 *
 * <p>The block of a further crystal has the items of a fit, with the camera of the first fit. Its explained spots are all that
 * it explains, shared ones too; its spots left over are those that no solution explains. The angle and the relations follow
 * from both orientations.
 *
 * <table>
 * <caption>Items of our own in the block of a further crystal</caption>
 * <tr><th>item</th><th>unit or values</th><th>meaning</th></tr>
 * <tr><td>{@code _zonewright_refln_shared}</td><td>yes, no</td><td>in the loop of explained spots: whether another solution of
 *     the pattern explains the spot too</td></tr>
 * <tr><td>{@code _zonewright_grain_misorientation_angle}</td><td>degrees</td><td>smallest angle by which it is turned from
 *     the fit's crystal</td></tr>
 * <tr><td>{@code _zonewright_grain_misorientation_axis_u}</td><td></td><td>lattice direction of the fit's crystal nearest to
 *     the axis of that turn, right-handed</td></tr>
 * <tr><td>{@code _zonewright_grain_misorientation_axis_v}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_grain_misorientation_axis_w}</td><td></td><td></td></tr>
 * <tr><td>{@code _zonewright_grain_misorientation_axis_off}</td><td>degrees</td><td>how far the axis is off it</td></tr>
 * <tr><td>{@code _zonewright_grain_relation_name}</td><td></td><td>in a loop: a twin law or coincidence-site lattice that
 *     the two crystals are near, for example {@code twin on (1 1 1)}, {@code Sigma 3}</td></tr>
 * <tr><td>{@code _zonewright_grain_relation_deviation}</td><td>degrees</td><td>how far they are off it</td></tr>
 * </table>
 *
 * <p>A calibration's record is of the same form. From the core dictionary it has {@code _audit_creation_date} (the day),
 * {@code _diffrn_measurement_device_details} (the user's name for the instrument), {@code _diffrn_source_voltage},
 * {@code _diffrn_radiation_probe} and {@code _diffrn_radiation_wavelength}. {@code _zonewright_camera_constant},
 * {@code _camera_ellipse_ratio}, {@code _camera_ellipse_azimuth} and {@code _camera_mirrored}, and the standard uncertainty
 * of the constant, are as in a fit's record; the type is {@code calibration}. It is to be used with images of the same
 * setting; K goes as 1/binning.
 *
 * <table>
 * <caption>Items of our own in the record of a calibration</caption>
 * <tr><th>item</th><th>unit or values</th><th>meaning</th></tr>
 * <tr><td>{@code _zonewright_calibration_name}</td><td></td><td>the user's name for it</td></tr>
 * <tr><td>{@code _zonewright_calibration_standard}</td><td></td><td>name of the standard; empty when none was used</td></tr>
 * <tr><td>{@code _zonewright_camera_length_nominal}</td><td>mm</td><td>camera length as the microscope shows it</td></tr>
 * <tr><td>{@code _zonewright_detector_pixel_size}</td><td>µm</td><td>size of an unbinned pixel</td></tr>
 * <tr><td>{@code _zonewright_detector_binning}</td><td></td><td>pixels joined to one along each side</td></tr>
 * <tr><td>{@code _zonewright_camera_ellipse_ratio_su}</td><td></td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_camera_ellipse_azimuth_su}</td><td>degrees</td><td>standard uncertainty</td></tr>
 * <tr><td>{@code _zonewright_image_rotation}</td><td>degrees</td><td>angle from the image to the pattern,
 *     counter-clockwise in the microscope frame; absent when not known</td></tr>
 * <tr><td>{@code _zonewright_image_rotation_su}</td><td>degrees</td><td>standard uncertainty</td></tr>
 * </table>
 */
package io.github.zonewright.document;
