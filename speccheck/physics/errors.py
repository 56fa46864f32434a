"""Random and quantisation errors of the excitation: gain, side-lobe floor, pointing, nulls."""

from __future__ import annotations

import numpy as np
from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats

_NEPERS_PER_DB = np.log(10) / 20


def error_variance(amplitude_rms_db: ArrayLike, phase_rms_deg: ArrayLike) -> Floats:
    """Variance of the relative excitation error.

    amplitude_rms_db [dB]: rms amplitude error.
    phase_rms_deg [deg]: rms phase error.
    Returns [1]: sigma_a^2 + sigma_p^2.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7.

    >>> float(error_variance(1.0, 10.0).round(4))
    0.0437
    """
    phase_rad: Floats = np.radians(floats(phase_rms_deg))
    variance: Floats = (_NEPERS_PER_DB * floats(amplitude_rms_db)) ** 2 + phase_rad**2
    return variance


def gain_loss_db(amplitude_rms_db: ArrayLike, phase_rms_deg: ArrayLike) -> Floats:
    """Mean loss of directivity by independent errors.

    amplitude_rms_db [dB]: rms amplitude error.
    phase_rms_deg [deg]: rms phase error.
    Returns [dB]: 10 log10((1 + sigma_a^2) e^(sigma_p^2)), positive; 1 dB and 10 deg cost 0.19 dB.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7.

    >>> float(gain_loss_db(1.0, 10.0).round(2))
    0.19
    """
    amplitude = (_NEPERS_PER_DB * floats(amplitude_rms_db)) ** 2
    return db((1 + amplitude) * np.exp(np.radians(floats(phase_rms_deg)) ** 2))


def sidelobe_floor_db(
    count: ArrayLike,
    amplitude_rms_db: ArrayLike,
    phase_rms_deg: ArrayLike,
    taper_efficiency: ArrayLike = 1.0,
) -> Floats:
    """Mean level of the error side lobes against the beam, element pattern aside.

    count [1]: independently driven elements or ports.
    amplitude_rms_db [dB]: rms amplitude error.
    phase_rms_deg [deg]: rms phase error.
    taper_efficiency [1]: efficiency of the taper.
    Returns [dB]: 10 log10(sigma^2/(N efficiency)), negative.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7.

    >>> float(sidelobe_floor_db(100, 1.0, 10.0).round(1))
    -33.6
    """
    return db(error_variance(amplitude_rms_db, phase_rms_deg) / (floats(count) * floats(taper_efficiency)))


def pointing_rms_deg(count: ArrayLike, pitch_wl: ArrayLike, phase_rms_deg: ArrayLike) -> Floats:
    """Rms pointing error of a uniform line by independent phase errors.

    count [1]: independently driven elements of the line, two or more.
    pitch_wl [wavelengths]: their pitch.
    phase_rms_deg [deg]: rms phase error.
    Returns [deg]: sigma_p sqrt(12/(N(N^2 - 1)))/(2 pi d), near broadside.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7: least-squares slope of N phases.

    >>> float(pointing_rms_deg(10, 0.5, 10.0).round(2))
    0.35
    """
    n = floats(count)
    slope: Floats = floats(phase_rms_deg) * np.sqrt(12 / (n * (n**2 - 1)))
    return slope / (2 * np.pi * floats(pitch_wl))


def null_depth_db(count: ArrayLike, amplitude_rms_db: ArrayLike, phase_rms_deg: ArrayLike) -> Floats:
    """Mean depth that a steered null can reach with independent errors.

    count [1]: independently driven elements.
    amplitude_rms_db [dB]: rms amplitude error.
    phase_rms_deg [deg]: rms phase error.
    Returns [dB]: against the beam, negative: the error floor fills the null.
    Source: R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7: the error field adds everywhere alike.

    >>> float(null_depth_db(64, 0.5, 5.0).round(1))
    -37.7
    """
    return sidelobe_floor_db(count, amplitude_rms_db, phase_rms_deg)


def phase_step_rms_deg(bits: ArrayLike) -> Floats:
    """Rms error of a phase shifter of a number of bits.

    bits [1]: bits.
    Returns [deg]: 180/(sqrt(3) 2^bits).
    Source: M. I. Skolnik, "Introduction to Radar Systems"; 3 bits: 12.99 deg.

    >>> float(phase_step_rms_deg(3).round(2))
    12.99
    """
    steps: Floats = np.power(2.0, floats(bits))
    return 180 / 3**0.5 / steps


def phase_quantisation_floor_db(count: ArrayLike, bits: ArrayLike) -> Floats:
    """Mean side-lobe level by phase quantisation whose errors are independent.

    count [1]: phase shifters.
    bits [1]: bits.
    Returns [dB]: 10 log10(pi^2/(3 2^(2 bits) N)), negative.
    Source: M. I. Skolnik, "Introduction to Radar Systems"; 3 bits, 100 elements: -32.9 dB.

    >>> float(phase_quantisation_floor_db(100, 3).round(1))
    -32.9
    """
    return sidelobe_floor_db(count, 0.0, phase_step_rms_deg(bits))


def phase_quantisation_lobe_db(bits: ArrayLike) -> Floats:
    """Worst periodic lobe by phase quantisation (errors repeat along the line).

    The printed rule of 6 dB a bit is low for few bits: 2 bits reach -9.54 dB, not -12.
    bits [1]: bits, two or more.
    Returns [dB]: -20 log10(2^bits - 1), negative.
    Source: exact sawtooth of phase; R. J. Mailloux, "Phased Array Antenna Handbook", ch. 7.

    >>> phase_quantisation_lobe_db([2, 4]).round(2).tolist()
    [-9.54, -23.52]
    """
    return -2 * db(np.power(2.0, floats(bits)) - 1)


def amplitude_step_rms_db(step_db: ArrayLike) -> Floats:
    """Rms error of an attenuator of a step.

    step_db [dB]: step.
    Returns [dB]: step/sqrt(12).
    Source: variance of a uniform distribution.

    >>> float(amplitude_step_rms_db(1.0).round(3))
    0.289
    """
    return floats(step_db) / 12**0.5


def surface_loss_db(rms_wl: ArrayLike) -> Floats:
    """Gain lost by a rough reflecting surface.

    rms_wl [wavelengths]: rms deviation.
    Returns [dB]: 10 log10(e) (4 pi eps)^2, positive.
    Source: J. Ruze, "Antenna tolerance theory"; 1/32: 0.67 dB.

    >>> float(surface_loss_db(1 / 32).round(2))
    0.67
    """
    phase_rad: Floats = 4 * np.pi * floats(rms_wl)
    return -db(np.exp(-(phase_rad**2)))
