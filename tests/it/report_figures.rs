//! The figures: their numbers read back from the drawing, and no label on another.
