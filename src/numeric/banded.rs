//! Banded systems of equations.
