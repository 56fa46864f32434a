"""Mismatch: VSWR, return loss and what a mismatch costs."""

from __future__ import annotations

from numpy.typing import ArrayLike

from speccheck.physics.decibels import Floats, db, floats, ratio


def reflection_magnitude(vswr: ArrayLike) -> Floats:
    """Magnitude of the reflection coefficient.

    vswr [1]: voltage standing-wave ratio, at least 1.
    Returns [1]: (s - 1)/(s + 1).
    Source: D. M. Pozar, "Microwave Engineering", ch. 2, equation of the standing-wave ratio.

    >>> float(reflection_magnitude(3))
    0.5
    """
    s = floats(vswr)
    return (s - 1) / (s + 1)


def return_loss_db(vswr: ArrayLike) -> Floats:
    """Return loss of a VSWR, positive.

    vswr [1]: voltage standing-wave ratio, at least 1; 1 gives infinity.
    Returns [dB]: -20 log10((s - 1)/(s + 1)).
    Source: D. M. Pozar, "Microwave Engineering", ch. 2: 1.2 gives 20.83 dB.

    >>> float(return_loss_db(1.2).round(2))
    20.83
    """
    return -2 * db(reflection_magnitude(vswr))


def vswr_from_return_loss(return_loss_db: ArrayLike) -> Floats:
    """VSWR of a return loss.

    return_loss_db [dB]: return loss, positive.
    Returns [1]: (1 + |r|)/(1 - |r|) with |r| = 10^(-RL/20).
    Source: D. M. Pozar, "Microwave Engineering", ch. 2: 14 dB is 1.50.

    >>> float(vswr_from_return_loss(14).round(2))
    1.5
    """
    magnitude = ratio(-floats(return_loss_db) / 2)
    return (1 + magnitude) / (1 - magnitude)


def mismatch_loss_db(vswr: ArrayLike) -> Floats:
    """Power lost to reflection at a port.

    vswr [1]: voltage standing-wave ratio, at least 1.
    Returns [dB]: -10 log10(1 - |r|^2), positive.
    Source: D. M. Pozar, "Microwave Engineering", ch. 2: 1.5 costs 0.1773 dB.

    >>> float(mismatch_loss_db(1.5).round(4))
    0.1773
    """
    return -db(1 - reflection_magnitude(vswr) ** 2)
