//! Smallest eigenvalues of a scaled stiffness matrix: how far it is from a mechanism, and which one.
use super::skyline::{Factor, Skyline};
use nalgebra::{DMatrix, SymmetricEigen};

/// Smallest eigenvalue of a positive definite matrix by inverse iteration with its factors.
pub(super) fn smallest_eigenvalue(factor: &impl Factor, size: usize) -> f64 {
    let mut vector = start_vector(size, 1);
    let mut smallest = f64::INFINITY;
    for _ in 0..30 {
        scale_to_one(&mut vector);
        let before = vector.clone();
        factor.solve(&mut vector);
        let growth: f64 = vector.iter().zip(&before).map(|(a, b)| a * b).sum();
        let estimate = 1.0 / growth;
        let settled = (estimate - smallest).abs() < 1e-3 * estimate.abs();
        smallest = estimate;
        if settled || !estimate.is_finite() {
            break;
        }
    }
    smallest
}

/// The softest `count` modes of a positive semidefinite matrix with a unit diagonal: eigenvalue and unit vector.
///
/// Subspace iteration on the inverse of the matrix with a shift far below any stiffness that matters. The matrices of
/// the projected problem are a few rows large.
pub(super) fn softest_modes(matrix: &Skyline, count: usize) -> Vec<(f64, Vec<f64>)> {
    let size = matrix.size();
    let count = count.min(size);
    let mut shift = 1e-12;
    let factor = loop {
        let mut shifted = matrix.clone();
        shifted.shift(shift);
        let factor = shifted.factorise();
        if factor.smallest > 0.0 || shift > 1e-8 {
            break factor;
        }
        shift *= 10.0;
    };
    let mut basis: Vec<Vec<f64>> = (0..count).map(|seed| start_vector(size, seed as u64 + 1)).collect();
    let mut modes = Vec::new();
    for _ in 0..12 {
        orthonormalise(&mut basis);
        let images: Vec<Vec<f64>> = basis
            .iter()
            .map(|vector| {
                let mut image = vector.clone();
                factor.solve(&mut image);
                image
            })
            .collect();
        let dot = |a: &[f64], b: &[f64]| a.iter().zip(b).map(|(x, y)| x * y).sum::<f64>();
        let projected =
            DMatrix::from_fn(count, count, |i, j| 0.5 * (dot(&basis[i], &images[j]) + dot(&basis[j], &images[i])));
        let eigen = SymmetricEigen::new(projected);
        let combine = |vectors: &[Vec<f64>], mode: usize| {
            let mut sum = vec![0.0; size];
            for (place, vector) in vectors.iter().enumerate() {
                let weight = eigen.eigenvectors[(place, mode)];
                for (total, value) in sum.iter_mut().zip(vector) {
                    *total += weight * value;
                }
            }
            sum
        };
        modes = (0..count).map(|mode| (1.0 / eigen.eigenvalues[mode] - shift, combine(&basis, mode))).collect();
        basis = (0..count).map(|mode| combine(&images, mode)).collect();
    }
    modes.sort_by(|a, b| a.0.total_cmp(&b.0));
    modes
}

/// Gram and Schmidt, twice, so that nearly parallel vectors come out square.
fn orthonormalise(vectors: &mut [Vec<f64>]) {
    for place in 0..vectors.len() {
        scale_to_one(&mut vectors[place]);
        for _ in 0..2 {
            let (done, rest) = vectors.split_at_mut(place);
            let Some(own) = rest.first_mut() else { continue };
            for other in done.iter() {
                let common: f64 = own.iter().zip(other).map(|(a, b)| a * b).sum();
                for (value, part) in own.iter_mut().zip(other) {
                    *value -= common * part;
                }
            }
            scale_to_one(own);
        }
    }
}

pub(super) fn scale_to_one(vector: &mut [f64]) {
    let length = vector.iter().map(|value| value * value).sum::<f64>().sqrt();
    if length > 0.0 && length.is_finite() {
        for value in vector {
            *value /= length;
        }
    }
}

/// Numbers between −1 and 1 without pattern, the same in every run, so that no mode is missed by symmetry.
pub(super) fn start_vector(size: usize, seed: u64) -> Vec<f64> {
    let mut state = seed.wrapping_mul(0x9E37_79B9_7F4A_7C15) | 1;
    (0..size)
        .map(|_| {
            state = state.wrapping_mul(6_364_136_223_846_793_005).wrapping_add(1_442_695_040_888_963_407);
            (state >> 11) as f64 / (1u64 << 52) as f64 - 1.0
        })
        .collect()
}
