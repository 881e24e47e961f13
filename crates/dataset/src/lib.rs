//! The data file.
#![no_std]
