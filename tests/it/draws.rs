//! Random draws that are the same in every run.

/// A light random generator (Marsaglia 2003, xorshift).
pub(crate) struct Draws(u64);

impl Draws {
    /// From a seed other than 0.
    pub(crate) fn new(seed: u64) -> Self {
        Self(seed)
    }
    fn next(&mut self) -> u64 {
        self.0 ^= self.0 << 13;
        self.0 ^= self.0 >> 7;
        self.0 ^= self.0 << 17;
        self.0
    }
    /// From 0 to below 1.
    pub(crate) fn part(&mut self) -> f64 {
        (self.next() >> 11) as f64 / (1_u64 << 53) as f64
    }
    pub(crate) fn between(&mut self, low: f64, high: f64) -> f64 {
        low + (high - low) * self.part()
    }
    /// A whole number, both ends included.
    pub(crate) fn from(&mut self, low: usize, high: usize) -> usize {
        low + usize::try_from(self.next() >> 33).unwrap() % (high - low + 1)
    }
    pub(crate) fn one<'a>(&mut self, of: &[&'a str]) -> &'a str {
        of[self.from(0, of.len() - 1)]
    }
}
