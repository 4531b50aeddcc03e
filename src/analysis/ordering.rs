//! The order of the equations: reverse Cuthill–McKee, so that the envelope of the matrix stays narrow.
use std::collections::VecDeque;

/// New place of every vertex of a graph given by its lists of neighbours.
///
/// # Source
/// A. George, J. Liu, Computer Solution of Large Sparse Positive Definite Systems, chapter 4 (recalled).
pub(super) fn reverse_cuthill_mckee(neighbours: &[Vec<usize>]) -> Vec<usize> {
    let size = neighbours.len();
    let mut reached = vec![false; size];
    let mut order = Vec::with_capacity(size);
    for seed in 0..size {
        if reached[seed] {
            continue;
        }
        for vertex in breadth_first(neighbours, far_end(neighbours, seed)) {
            reached[vertex] = true;
            order.push(vertex);
        }
    }
    let mut place = vec![0; size];
    for (position, vertex) in order.into_iter().rev().enumerate() {
        place[vertex] = position;
    }
    place
}

/// A vertex about as far as possible from another: the narrow end of the graph.
fn far_end(neighbours: &[Vec<usize>], seed: usize) -> usize {
    let mut vertex = seed;
    for _ in 0..4 {
        let Some(last) = breadth_first(neighbours, vertex).pop() else { break };
        vertex = last;
    }
    vertex
}

/// Vertices in the order they are reached, of those reached together the ones with few neighbours first.
fn breadth_first(neighbours: &[Vec<usize>], seed: usize) -> Vec<usize> {
    let mut reached = std::collections::BTreeSet::from([seed]);
    let mut queue = VecDeque::from([seed]);
    let mut order = Vec::new();
    while let Some(vertex) = queue.pop_front() {
        order.push(vertex);
        let mut next: Vec<usize> = neighbours[vertex].iter().copied().filter(|n| !reached.contains(n)).collect();
        next.sort_unstable_by_key(|n| (neighbours[*n].len(), *n));
        for vertex in next {
            if reached.insert(vertex) {
                queue.push_back(vertex);
            }
        }
    }
    order
}

#[cfg(test)]
mod tests {
    use super::*;

    /// A path numbered at random has a best half-bandwidth of one.
    #[test]
    fn a_path_gets_a_bandwidth_of_one() {
        let path = [3, 0, 4, 1, 5, 2];
        let mut neighbours = vec![Vec::new(); 6];
        for pair in path.windows(2) {
            neighbours[pair[0]].push(pair[1]);
            neighbours[pair[1]].push(pair[0]);
        }
        let place = reverse_cuthill_mckee(&neighbours);
        for pair in path.windows(2) {
            assert_eq!(place[pair[0]].abs_diff(place[pair[1]]), 1);
        }
    }
}
