//! What the machine has: memory that a solve may take.

use std::fs;

/// Share of the available memory that the matrix may take by default: the rest is for factors, tractions and others.
const SHARE: f64 = 0.6;

/// Taken where the system doesn't tell: less than any machine of the last ten years has free, bytes.
const FALLBACK: u64 = 2 << 30;

/// Bytes that the matrix may take if nothing else is said.
pub fn memory_limit() -> u64 {
    let available = [available_memory(), control_group_memory()].into_iter().flatten().min().unwrap_or(FALLBACK);
    (available as f64 * SHARE) as u64
}

fn available_memory() -> Option<u64> {
    available_in(&fs::read_to_string("/proc/meminfo").ok()?)
}

/// In a container the limit of its control group counts, not the host's memory.
fn control_group_memory() -> Option<u64> {
    let number = |path: &str| fs::read_to_string(path).ok()?.trim().parse::<u64>().ok();
    let limit = number("/sys/fs/cgroup/memory.max")?;
    Some(limit.saturating_sub(number("/sys/fs/cgroup/memory.current").unwrap_or(0)))
}

fn available_in(meminfo: &str) -> Option<u64> {
    let line = meminfo.lines().find_map(|line| line.strip_prefix("MemAvailable:"))?;
    let kibibytes = line.trim().strip_suffix("kB")?.trim().parse::<u64>().ok()?;
    kibibytes.checked_mul(1024)
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn reads_what_the_kernel_writes() {
        let text = "MemTotal:       16261680 kB\nMemFree:         1192832 kB\nMemAvailable:    8000000 kB\n";
        assert_eq!(available_in(text), Some(8_000_000 * 1024));
        assert_eq!(available_in("MemTotal: 1 kB\n"), None);
        assert!(memory_limit() > 0);
    }
}
