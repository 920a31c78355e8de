//! Precession, nutation and sidereal time.
