//! The kernel sums in lanes of eight: a target panel against a tile of source panels (the far field), a point against a
//! cloud of points (near panels), and lists of point pairs (curved touching panels).
//!
//! The same code is compiled three times, for AVX-512, for AVX2 with FMA, and for any machine; which runs is decided
//! once, by asking the processor. With FMA, products are not rounded before they are added, so results differ between
//! the instruction sets by a few units in the last place of the largest term.
//!
//! This is the only file with `unsafe` code: calling a function that was compiled for an instruction set is sound
//! only if the processor has it, which [`Instructions`] establishes.
#![expect(unsafe_code, reason = "calls into functions compiled for an instruction set found at run time")]

use super::PairBlock;

/// Source panels a tile, and point pairs a chunk.
pub const LANES: usize = 8;

/// Numbers that a quadrature point of a tile takes: position, and weight times basis function for each corner.
pub const TILE_NUMBERS: usize = 6;

/// Numbers that a point pair takes: difference of the positions, three basis values of the first point times the weight,
/// three of the second.
pub const PAIR_NUMBERS: usize = 9;

/// `block[3 a + b][entry][lane]`: corner of the target, corner of the source, entry of `G`, source panel.
pub type TileBlock = [[[f64; LANES]; 6]; 9];

/// `sums[b][entry][lane]`: corner of the source, entry of `G`; the lanes are still to be added up.
pub type CloudSums = [[[f64; LANES]; 6]; 3];

/// An instruction set that this processor has.
#[derive(Debug, Clone, Copy, PartialEq, Eq)]
pub struct Instructions(Set);

#[derive(Debug, Clone, Copy, PartialEq, Eq)]
enum Set {
    Portable,
    #[cfg(target_arch = "x86_64")]
    Avx2,
    #[cfg(target_arch = "x86_64")]
    Avx512,
}

impl Instructions {
    /// The widest one.
    pub fn best() -> Self {
        Self::available().pop().unwrap_or(Self(Set::Portable))
    }

    /// All of them, narrowest first.
    pub fn available() -> Vec<Self> {
        let mut sets = vec![Self(Set::Portable)];
        #[cfg(target_arch = "x86_64")]
        {
            if is_x86_feature_detected!("avx2") && is_x86_feature_detected!("fma") {
                sets.push(Self(Set::Avx2));
            }
            if is_x86_feature_detected!("avx512f") {
                sets.push(Self(Set::Avx512));
            }
        }
        sets
    }

    /// Its name.
    pub fn name(self) -> &'static str {
        match self.0 {
            Set::Portable => "portable",
            #[cfg(target_arch = "x86_64")]
            Set::Avx2 => "AVX2",
            #[cfg(target_arch = "x86_64")]
            Set::Avx512 => "AVX-512",
        }
    }

    /// The pair integrals of a target panel with all panels of a tile, both with `points` quadrature points.
    ///
    /// `target` holds [`TILE_NUMBERS`] numbers a point, `tile` as many for each lane.
    pub fn tile_block(self, target: &[f64], tile: &[f64], block: &mut TileBlock) {
        match self.0 {
            Set::Portable => kernel::<false>(target, tile, block),
            // SAFETY: values of these sets are made by `available` alone, after the processor said it has them.
            #[cfg(target_arch = "x86_64")]
            Set::Avx2 => unsafe { avx2(target, tile, block) },
            #[cfg(target_arch = "x86_64")]
            // SAFETY: as above.
            Set::Avx512 => unsafe { avx512(target, tile, block) },
        }
    }

    /// Adds to `sums` what a cloud of points does at `x`; `cloud` holds chunks of [`TILE_NUMBERS`] lanes.
    pub fn add_cloud(self, x: &[f64; 3], cloud: &[f64], sums: &mut CloudSums) {
        match self.0 {
            Set::Portable => cloud_sums::<false>(x, cloud, sums),
            #[cfg(target_arch = "x86_64")]
            // SAFETY: as above.
            Set::Avx2 => unsafe { cloud_avx2(x, cloud, sums) },
            #[cfg(target_arch = "x86_64")]
            // SAFETY: as above.
            Set::Avx512 => unsafe { cloud_avx512(x, cloud, sums) },
        }
    }

    /// Adds the integrand of point pairs to `block`; `numbers` holds chunks of [`PAIR_NUMBERS`] lanes.
    pub fn add_point_pairs(self, numbers: &[f64], block: &mut PairBlock) {
        match self.0 {
            Set::Portable => pairs::<false>(numbers, block),
            #[cfg(target_arch = "x86_64")]
            // SAFETY: as above.
            Set::Avx2 => unsafe { pairs_avx2(numbers, block) },
            #[cfg(target_arch = "x86_64")]
            // SAFETY: as above.
            Set::Avx512 => unsafe { pairs_avx512(numbers, block) },
        }
    }
}

#[cfg(target_arch = "x86_64")]
#[target_feature(enable = "avx2,fma")]
fn avx2(target: &[f64], tile: &[f64], block: &mut TileBlock) {
    kernel::<true>(target, tile, block);
}

#[cfg(target_arch = "x86_64")]
#[target_feature(enable = "avx512f")]
fn avx512(target: &[f64], tile: &[f64], block: &mut TileBlock) {
    kernel::<true>(target, tile, block);
}

#[cfg(target_arch = "x86_64")]
#[target_feature(enable = "avx2,fma")]
fn pairs_avx2(numbers: &[f64], block: &mut PairBlock) {
    pairs::<true>(numbers, block);
}

#[cfg(target_arch = "x86_64")]
#[target_feature(enable = "avx512f")]
fn pairs_avx512(numbers: &[f64], block: &mut PairBlock) {
    pairs::<true>(numbers, block);
}

#[cfg(target_arch = "x86_64")]
#[target_feature(enable = "avx2,fma")]
fn cloud_avx2(x: &[f64; 3], cloud: &[f64], sums: &mut CloudSums) {
    cloud_sums::<true>(x, cloud, sums);
}

#[cfg(target_arch = "x86_64")]
#[target_feature(enable = "avx512f")]
fn cloud_avx512(x: &[f64; 3], cloud: &[f64], sums: &mut CloudSums) {
    cloud_sums::<true>(x, cloud, sums);
}

type Lanes = [f64; LANES];

#[inline(always)]
fn each(f: impl Fn(usize) -> f64) -> Lanes {
    let mut lanes = [0.0; LANES];
    for (lane, value) in lanes.iter_mut().enumerate() {
        *value = f(lane);
    }
    lanes
}

/// `a b + c`; without FMA instructions `mul_add` would be a call into a library.
#[inline(always)]
fn fused<const FMA: bool>(a: f64, b: f64, c: f64) -> f64 {
    if FMA { a.mul_add(b, c) } else { a * b + c }
}

/// The six entries of `G` at the differences `x, y, z`.
#[inline(always)]
fn stokeslets<const FMA: bool>(x: Lanes, y: Lanes, z: Lanes) -> [Lanes; 6] {
    let square = each(|l| fused::<FMA>(x[l], x[l], fused::<FMA>(y[l], y[l], z[l] * z[l])));
    let inverse = each(|l| 1.0 / square[l].sqrt());
    let cube = each(|l| inverse[l] * inverse[l] * inverse[l]);
    let (xc, yc, zc) = (each(|l| x[l] * cube[l]), each(|l| y[l] * cube[l]), each(|l| z[l] * cube[l]));
    [
        each(|l| fused::<FMA>(x[l], xc[l], inverse[l])),
        each(|l| x[l] * yc[l]),
        each(|l| x[l] * zc[l]),
        each(|l| fused::<FMA>(y[l], yc[l], inverse[l])),
        each(|l| y[l] * zc[l]),
        each(|l| fused::<FMA>(z[l], zc[l], inverse[l])),
    ]
}

#[inline(always)]
fn lanes_of(numbers: &[f64], k: usize) -> Lanes {
    each(|lane| numbers[k * LANES + lane])
}

#[inline(always)]
fn kernel<const FMA: bool>(target: &[f64], tile: &[f64], block: &mut TileBlock) {
    *block = [[[0.0; LANES]; 6]; 9];
    for source in tile.chunks_exact(TILE_NUMBERS * LANES) {
        let (sx, sy, sz) = (lanes_of(source, 0), lanes_of(source, 1), lanes_of(source, 2));
        let mut sums = [[[0.0; LANES]; 6]; 3];
        for point in target.chunks_exact(TILE_NUMBERS) {
            let x = each(|l| point[0] - sx[l]);
            let y = each(|l| point[1] - sy[l]);
            let z = each(|l| point[2] - sz[l]);
            let g = stokeslets::<FMA>(x, y, z);
            for (a, sum) in sums.iter_mut().enumerate() {
                let weight = point[3 + a];
                for (entry, value) in sum.iter_mut().zip(&g) {
                    *entry = each(|l| fused::<FMA>(weight, value[l], entry[l]));
                }
            }
        }
        for b in 0..3 {
            let weight = lanes_of(source, 3 + b);
            for (a, sum) in sums.iter().enumerate() {
                for (entry, value) in block[3 * a + b].iter_mut().zip(sum) {
                    *entry = each(|l| fused::<FMA>(weight[l], value[l], entry[l]));
                }
            }
        }
    }
}

#[inline(always)]
fn cloud_sums<const FMA: bool>(point: &[f64; 3], cloud: &[f64], sums: &mut CloudSums) {
    for source in cloud.chunks_exact(TILE_NUMBERS * LANES) {
        let (sx, sy, sz) = (lanes_of(source, 0), lanes_of(source, 1), lanes_of(source, 2));
        let x = each(|l| point[0] - sx[l]);
        let y = each(|l| point[1] - sy[l]);
        let z = each(|l| point[2] - sz[l]);
        let g = stokeslets::<FMA>(x, y, z);
        for (b, sum) in sums.iter_mut().enumerate() {
            let weight = lanes_of(source, 3 + b);
            for (entry, value) in sum.iter_mut().zip(&g) {
                *entry = each(|l| fused::<FMA>(weight[l], value[l], entry[l]));
            }
        }
    }
}

#[inline(always)]
fn pairs<const FMA: bool>(numbers: &[f64], block: &mut PairBlock) {
    let mut sums: TileBlock = [[[0.0; LANES]; 6]; 9];
    for chunk in numbers.chunks_exact(PAIR_NUMBERS * LANES) {
        let g = stokeslets::<FMA>(lanes_of(chunk, 0), lanes_of(chunk, 1), lanes_of(chunk, 2));
        for a in 0..3 {
            let first = lanes_of(chunk, 3 + a);
            for b in 0..3 {
                let second = lanes_of(chunk, 6 + b);
                let product = each(|l| first[l] * second[l]);
                for (entry, value) in sums[3 * a + b].iter_mut().zip(&g) {
                    *entry = each(|l| fused::<FMA>(product[l], value[l], entry[l]));
                }
            }
        }
    }
    for (entry, lanes) in block.iter_mut().flatten().flatten().zip(sums.iter().flatten()) {
        *entry += lanes.iter().sum::<f64>();
    }
}

#[cfg(test)]
mod tests {
    use super::*;

    /// Numbers in `[0.1, 1.1)` that look random, the same every time.
    fn numbers(count: usize) -> Vec<f64> {
        (0..count).map(|k| 0.1 + (k as f64 * 0.618_033_988_749_895).fract()).collect()
    }

    /// Every term is positive or bounded by the diagonal's, so rounding stays within a few units of the last place of
    /// the largest entry, times the root of the number of terms.
    #[test]
    fn all_instruction_sets_agree() {
        let target = numbers(16 * TILE_NUMBERS).iter().map(|x| x + 3.0).collect::<Vec<_>>();
        let tile = numbers(16 * TILE_NUMBERS * LANES);
        let pairs = numbers(40 * PAIR_NUMBERS * LANES);
        let results = Instructions::available().into_iter().map(|set| {
            let (mut tile_block, mut pair_block) = ([[[0.0; LANES]; 6]; 9], PairBlock::default());
            set.tile_block(&target, &tile, &mut tile_block);
            set.add_point_pairs(&pairs, &mut pair_block);
            (tile_block, pair_block)
        });
        let results = results.collect::<Vec<_>>();
        let (tile_block, pair_block) = &results[0];
        for (other_tile, other_pair) in &results[1..] {
            let close = |a: &f64, b: &f64, scale: f64| (a - b).abs() <= 1e-14 * scale;
            let scale = tile_block.iter().flatten().flatten().fold(0.0_f64, |most, x| most.max(x.abs()));
            let same = tile_block.iter().flatten().flatten().zip(other_tile.iter().flatten().flatten());
            assert!(scale > 0.0 && same.into_iter().all(|(a, b)| close(a, b, scale)));
            let scale = pair_block.iter().flatten().flatten().fold(0.0_f64, |most, x| most.max(x.abs()));
            let same = pair_block.iter().flatten().flatten().zip(other_pair.iter().flatten().flatten());
            assert!(scale > 0.0 && same.into_iter().all(|(a, b)| close(a, b, scale)));
        }
    }

    #[test]
    fn the_tile_sum_is_the_double_sum_of_stokeslets() {
        use crate::stokes::green::stokeslet;
        use crate::surface::Point;
        let target = numbers(6 * TILE_NUMBERS).iter().map(|x| x - 3.0).collect::<Vec<_>>();
        let tile = numbers(6 * TILE_NUMBERS * LANES);
        let mut block: TileBlock = [[[0.0; LANES]; 6]; 9];
        Instructions::best().tile_block(&target, &tile, &mut block);
        for lane in 0..LANES {
            let mut expected = [[0.0; 6]; 9];
            for x in target.chunks_exact(TILE_NUMBERS) {
                for source in tile.chunks_exact(TILE_NUMBERS * LANES) {
                    let y = [0, 1, 2, 3, 4, 5].map(|k| source[k * LANES + lane]);
                    let g = stokeslet(&Point::new(x[0] - y[0], x[1] - y[1], x[2] - y[2]));
                    for a in 0..3 {
                        for b in 0..3 {
                            for k in 0..6 {
                                expected[3 * a + b][k] += x[3 + a] * y[3 + b] * g[k];
                            }
                        }
                    }
                }
            }
            for (row, expected) in block.iter().zip(expected) {
                for (lanes, expected) in row.iter().zip(expected) {
                    assert!((lanes[lane] - expected).abs() < 1e-13 * expected.abs().max(1.0));
                }
            }
        }
    }
}
