//! Civil dates and times of a zone: local days that are longer or shorter than 24 hours, hours
//! that occur twice or not at all.
