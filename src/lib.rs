//! Work backward from a measured crash scene to the speeds before impact.
//!
//! The pipeline, in order; each step uses only those that stand after it here:
//!
//! 1. [`cli`], words to calls; reads files, writes files.
//! 2. [`report`], an outcome as a document, for terminal, JSON or PDF.
//! 3. [`analysis`], one case through all steps.
//! 4. [`rules`], what the trade knows to go wrong.
//! 5. [`sheet`], worked lines. [`uncertainty`], bands.
//! 6. [`plan`], the compiled calculation that all of them read.
//! 7. [`case`], the case file, checked. [`physics`], the formulas.
//! 8. [`method`], what a formula is.
//! 9. [`scalar`], [`units`], [`stats`], numbers.
//! 10. [`diag`], notices.
//!
//! Results are a calculation aid and a record, not an opinion: see
//! [`report::caution`].

#![forbid(unsafe_code)]

pub mod analysis;
pub mod case;
pub mod cli;
pub mod diag;
pub mod method;
pub mod physics;
pub mod plan;
pub mod report;
pub mod rules;
pub mod scalar;
pub mod sheet;
pub mod stats;
pub mod uncertainty;
pub mod units;
