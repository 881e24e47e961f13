//! Loaders and tolerances shared by the tests.
