//! Numbers and units as people type them, in the habit of their site.
