//! Distribution functions needed for confidence intervals.
