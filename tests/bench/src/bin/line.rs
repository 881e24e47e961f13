//! Prints the seeded line, for benchmarks outside Rust.

fn main() {
    println!("{}", leeway_bench::line(7));
}
