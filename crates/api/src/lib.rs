//! Placeholder head.
#![no_std]
