//! The subcommands: parse, resolve, run, print.
