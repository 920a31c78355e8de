//! Everything a person reads: wording, numbers and times.
