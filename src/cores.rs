//! Work spread over the cores of the machine; what comes out does not depend on how many there are.
use std::sync::atomic::{AtomicUsize, Ordering};

/// Works the items 0 to `count` on as many cores as there are, each with a state of its own; the order is kept.
///
/// What goes wrong in one item goes wrong in the caller.
pub(crate) fn side_by_side<S, R: Send>(
    count: usize,
    state: impl Fn() -> S + Sync,
    work: impl Fn(&mut S, usize) -> R + Sync,
) -> Vec<R> {
    let cores = std::thread::available_parallelism().map_or(1, usize::from).min(8).min(count);
    if cores < 2 {
        let mut state = state();
        return (0..count).map(|at| work(&mut state, at)).collect();
    }
    let next = AtomicUsize::new(0);
    let part = || {
        let mut state = state();
        let mut done = Vec::with_capacity(count / cores + 1);
        loop {
            let at = next.fetch_add(1, Ordering::Relaxed);
            if at >= count {
                return done;
            }
            done.push((at, work(&mut state, at)));
        }
    };
    let mut done = std::thread::scope(|scope| {
        let others: Vec<_> = (1..cores).map(|_| scope.spawn(part)).collect();
        let mut done = part();
        for other in others {
            match other.join() {
                Ok(part) => done.extend(part),
                Err(reason) => std::panic::resume_unwind(reason),
            }
        }
        done
    });
    done.sort_unstable_by_key(|(at, _)| *at);
    done.into_iter().map(|(_, result)| result).collect()
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_order_is_kept() {
        assert_eq!(side_by_side(1000, || 0, |_, at| at * 2), (0..1000).map(|at| at * 2).collect::<Vec<_>>());
        assert!(side_by_side(0, || 0, |_, at| at).is_empty());
    }
}
