//! The audit: the demonstration's expected answers, synthetic truth, bad files, trends, matching.

mod bad;
mod demo;
mod sites;
mod truth;
