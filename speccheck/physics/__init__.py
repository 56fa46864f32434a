"""Antenna-panel physics: numpy in, numpy out, numpy only.

Public functions are pure, take scalars or arrays that broadcast, and state units in [brackets] in their
docstrings. Angles, decibels and megahertz appear only where the name says so; otherwise SI. Axes follow
3GPP TR 38.901 clause 7.1: panel in the y-z plane, boresight +x, theta [deg] from zenith, phi [deg] azimuth,
tilt [deg] positive downwards. All pattern figures are for one polarisation. Import from the submodules
(`from speccheck.physics import matching, states`); this index is the whole public surface.

decibels         SPEED_OF_LIGHT_MPS, db(ratio), ratio(level_db), wavelength_m(freq_hz), floats(values)
matching         vswr_from_return_loss(return_loss_db), return_loss_db(vswr), mismatch_loss_db(vswr),
                 reflection_magnitude(vswr)
power            watts(level_dbm), dbm(power_w), eirp_dbm(total_power_w, gain_dbi, loss_db=0),
                 implied_gain_dbi(eirp_dbm, total_power_w, loss_db=0), erp_dbm(eirp_dbm),
                 eirp_from_erp_dbm(erp_dbm), dbi_from_dbd(gain_dbd), dbd_from_dbi(gain_dbi),
                 sum_dbm(levels_dbm, axis=-1), total_power_w(power_per_port_w, ports),
                 trp_dbm(total_power_w, loss_db), rf_efficiency(radiated_w, consumed_w, duty=1)
intermodulation  level_dbm(relative_dbc, carrier_dbm), relative_dbc(level_dbm, carrier_dbm),
                 at_carrier_dbm(level_dbm, from_carrier_dbm, to_carrier_dbm, slope=3), at_carrier_dbc(...)
wind             dynamic_pressure_pa(speed_mps), force_n(drag_coefficient, speed_mps, area_m2),
                 drag_coefficient(force_n, speed_mps, area_m2), scaled_force_n(force_n, from_mps, to_mps)
exposure         power_density_wm2(eirp_w, distance_m, reflection=1),
                 distance_m(eirp_w, limit_wm2, reflection=1, factor=1), combined_distance_m(distances_m),
                 exposure_ratio(densities, limits), round_up_m(distance_m, step_m=0.1), field_strength_vm,
                 far_field_pattern_m, far_field_exposure_m, near_field_m (largest_m, freq_hz),
                 surface_density_wm2, near_field_density_wm2, transition_density_wm2,
                 cylindrical_oet65_wm2, cylindrical_crossover_m, cylindrical_iec62232_wm2,
                 REFLECTION_NONE / _GROUND / _FULL
grating          pitch_limit_wl(scan_deg, count=inf), entry_angle_deg(pitch_wl),
                 entry_freq_hz(pitch_m, scan_deg), lobe_angle_deg(pitch_wl, scan_deg, order=-1),
                 triangular_side_limit_wl(scan_deg), lattice_entry_freq_hz(lobes_per_m, beams)

element          SectorElement(az_hpbw_deg=65, el_hpbw_deg=65, floor_db=30, el_floor_db=30) of TR 38.901 form,
                 CosineElement(exponent), IsotropicElement(front_only=False); each
                 .power(theta_rad, phi_rad) [1] and .directivity_dbi() [dBi]
layout           ArrayLayout(rows, columns, vertical_pitch_m, horizontal_pitch_m, subarray_rows=1,
                 subarray_columns=1, subarray_tilt_deg=0, row_taper=(), column_taper=(), panel_rows=1,
                 panel_columns=1, panel_vertical_pitch_m=0, panel_horizontal_pitch_m=0,
                 lattice=Lattice.RECTANGULAR); rows and columns are element positions of ONE panel group,
                 a taper holds the amplitudes of the ports along the whole aperture
                 .height_m, .width_m, .ports_per_polarisation
states           array_states(layout, element, freq_hz, tilt_deg=0, scan_deg=0) -> ArrayStates; freq, tilt and
                 scan broadcast. Fields: directivity_dbi, peak_theta_deg, peak_phi_deg,
                 horizontal_beamwidth_deg, vertical_beamwidth_deg, first_sidelobe_horizontal_db,
                 first_sidelobe_vertical_db, upper_sidelobe_db (first above the beam),
                 highest_sidelobe_horizontal_db (at highest_sidelobe_phi_deg), highest_sidelobe_vertical_db
                 (at highest_sidelobe_theta_deg): against the beam, negative; nan where the cut has none
                 directivity_dbi(layout, element, freq_hz, tilt_deg=0, scan_deg=0) alone
                 scan_loss_db(layout, element, freq_hz, tilt_deg=0, scan_deg=0) against the unscanned beam
pattern          gain_pattern_dbi(layout, element, freq_hz, theta_deg, phi_deg, *, tilt_deg=0, scan_deg=0)
                 directivity in any directions, for drawings and exposure; power_pattern(layout, element,
                 freq_hz, tilt_deg, scan_deg, theta_deg, phi_deg): the same as a ratio
                 nominal_pattern_dbi(..., element_gain_dbi): composite gain as ITU-R M.2101 prints it
lobes            element_lobes(layout, element, freq_hz, tilt_deg=0, scan_deg=0) -> Lobes,
                 subarray_lobes(...), highest_lobe(...) anywhere in front. Lobes: level_db against the beam
                 (nan: none), theta_deg, phi_deg, visible_count, centre_visible
reciprocal       element_points(layout, wavelength_m), subarray_points(layout, wavelength_m): where, in
                 direction cosines around the beam, those lobes have their centres
taper            taylor(count, sidelobe_db, nbar), chebyshev(count, sidelobe_db),
                 cosine_on_pedestal(count, pedestal), efficiency_db(weights), beamwidth_ratio(weights),
                 pedestal_for_ratio(count, ratio, grouped=1), sidelobe_db(weights), line_pattern(weights),
                 half_power_phase_rad(weights), taylor_dilation(sidelobe_db, nbar)
errors           error_variance(amplitude_rms_db, phase_rms_deg), gain_loss_db(...) of the same,
                 sidelobe_floor_db(count, ...),
                 pointing_rms_deg(count, pitch_wl, phase_rms_deg), null_depth_db(count, ...),
                 phase_step_rms_deg(bits), phase_quantisation_floor_db(count, bits),
                 phase_quantisation_lobe_db(bits), amplitude_step_rms_db(step_db), surface_loss_db(rms_wl)
bounds           BEAMWIDTH_CONSTANTS (values, domains, sources), aperture_directivity_dbi(width_m, height_m,
                 freq_hz), aperture_is_hard(width_m, height_m, freq_hz),
                 cell_directivity_dbi(horizontal_pitch_wl, vertical_pitch_wl),
                 narrowest_beamwidth_deg(length_m, freq_hz), shortest_length_m(el_hpbw_deg, freq_hz),
                 chebyshev_beamwidth_ratio(count, sidelobe_db), chebyshev_sidelobe_db(count, ratio),
                 gain_from_beamwidths_dbi(az_hpbw_deg, el_hpbw_deg, constant=31000),
                 implied_beamwidth_constant(gain_dbi, az_hpbw_deg, el_hpbw_deg),
                 normal_gain_dbi(radius_m, freq_hz), cosine_scan_loss_db(scan_deg, exponent=1),
                 aperture_slope_db(from_hz, to_hz)
beamwidth        uniform_line_deg(count, pitch_m, freq_hz), first_null_width_deg(count, pitch_m, freq_hz),
                 parabolic_level_width_deg(hpbw_deg, level_db), uniform_level_ratio(level_db),
                 scanned_width_deg(hpbw_deg, scan_deg), phase_step_deg(pitch_wl, steer_deg)
sector           F.1336-5: elevation_beamwidth_deg(gain_dbi, az_hpbw_deg), peak_pattern_dbi and
                 average_pattern_dbi(gain_dbi, az_hpbw_deg, el_hpbw_deg, azimuth_deg, elevation_deg, *,
                 parameters=IMPROVED), tilted_mechanically(azimuth_deg, elevation_deg, tilt_deg)
zones            panel_distances(layout, element, freq_hz, *, power_w, limit_wm2, beams_deg=((0, 0),),
                 reflection=1, factor=1, mechanical_tilt_deg=0, gain_dbi=None) -> PanelDistances: front_m,
                 above_m, below_m, beside_m, behind_m; envelope_dbi(...) of a set of beams
expected         PanelClass (PASSIVE, MASSIVE_MIMO, MMWAVE), panel_class(freq_hz, columns),
                 expected_gain(layout, freq_hz, kind, *, tilt_deg=0, scan_deg=0,
                 horizontal_beamwidth_deg=None, vertical_beamwidth_deg=None, declared_loss_db=None)
                 -> ExpectedGain: directivity_dbi, impossible_dbi, question_dbi, low_dbi, binding,
                 assumptions, .zone(gain_dbi) -> GainZone (IMPOSSIBLE, QUESTION, PLAUSIBLE, LOW);
                 expected_beamwidths(layout, freq_hz, *, tilt_deg=0, scan_deg=0): .horizontal and .vertical
                 = WidthEdges(uniform_deg, reject_deg, question_deg, wide_deg) or None
influences       gain_influences(layout, freq_hz, gain, *, tilt_deg=0, scan_deg=0) -> Influence (name, over,
                 low_db, high_db, span_db), strongest first: each input of an ExpectedGain varied alone

Inner workings, in the order of a calculation: layout (lines, row_shifts, wavenumber, row_weights,
column_weights) places and drives the elements, field gives the far field, beam finds where it points,
radiated integrates it by the lag form (quadrature serves the kernels of its elements), cuts samples both
principal cuts, readings reads widths and lobes.
"""
