//! Rebuilds when an embedded folder gains or loses a file, which `include_dir!` alone does not see.

fn main() {
    println!("cargo::rerun-if-changed=rules");
    println!("cargo::rerun-if-changed=templates");
}
