//! Time zones: the IANA list and a suggestion from coordinates.
