//! Arguments to the window or a subcommand; reads the clock and the zone once.
fn main() {}
