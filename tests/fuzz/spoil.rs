//! Inputs made of sound ones by chance: the same seed makes the same inputs.

/// A source of chance and what it does to texts.
pub(super) struct Spoiler(u64);

impl Spoiler {
    pub(super) fn new(seed: u64) -> Self {
        Self(seed.wrapping_mul(0x9e37_79b9_7f4a_7c15) | 1)
    }

    /// A whole number below `end` (xorshift64*, Vigna 2016).
    fn below(&mut self, end: usize) -> usize {
        self.0 ^= self.0 >> 12;
        self.0 ^= self.0 << 25;
        self.0 ^= self.0 >> 27;
        (self.0.wrapping_mul(0x2545_f491_4f6c_dd1d) >> 33) as usize % end.max(1)
    }

    fn one_of<'t, T>(&mut self, all: &'t [T]) -> &'t T {
        &all[self.below(all.len())]
    }

    /// One of the texts with a few things done to it.
    pub(super) fn spoilt(&mut self, texts: &[Vec<u8>], words: &[&str]) -> Vec<u8> {
        let mut text = self.one_of(texts).clone();
        for _ in 0..=self.below(4) {
            self.spoil(&mut text, texts, words);
        }
        text.truncate(64 << 10);
        text
    }

    fn spoil(&mut self, text: &mut Vec<u8>, texts: &[Vec<u8>], words: &[&str]) {
        let (start, end) = self.token(text);
        let line = self.line(text);
        match self.below(12) {
            // A word of the language, or a hostile one, in the place of a token, or before it.
            0..=3 => drop(text.splice(start..end, self.one_of(words).bytes())),
            4 => drop(text.splice(start..start, self.one_of(words).bytes())),
            // A token of the same text: names where others stand, units where numbers do.
            5 | 6 => {
                let (from, to) = self.token(text);
                let other = text[from..to].to_vec();
                drop(text.splice(start..end, other));
            }
            7 => drop(text.drain(line.0..line.1)),
            8 => {
                let twice = text[line.0..line.1].to_vec();
                drop(text.splice(line.0..line.0, twice));
            }
            // A piece of another text.
            9 => {
                let other = self.one_of(texts).clone();
                let from = self.below(other.len());
                let length = self.below(200).min(other.len() - from);
                drop(text.splice(start..start, other[from..from + length].iter().copied()));
            }
            10 => {
                let cut = self.below(text.len());
                text.truncate(cut);
            }
            // Any byte, which may end the text's being UTF-8.
            _ => {
                let byte = self.below(256) as u8;
                drop(text.splice(start..start, [byte]));
            }
        }
    }

    /// Bytes of a run of letters and digits, or of one mark.
    fn token(&mut self, text: &[u8]) -> (usize, usize) {
        let at = self.below(text.len());
        let is_word = |byte: &u8| byte.is_ascii_alphanumeric() || *byte == b'.' || *byte >= 0x80;
        if !text.get(at).is_some_and(is_word) {
            return (at, (at + 1).min(text.len()));
        }
        let start = text[..at].iter().rposition(|byte| !is_word(byte)).map_or(0, |before| before + 1);
        let end = text[at..].iter().position(|byte| !is_word(byte)).map_or(text.len(), |after| at + after);
        (start, end)
    }

    fn line(&mut self, text: &[u8]) -> (usize, usize) {
        let at = self.below(text.len());
        let start = text[..at].iter().rposition(|byte| *byte == b'\n').map_or(0, |before| before + 1);
        let end = text[at..].iter().position(|byte| *byte == b'\n').map_or(text.len(), |after| at + after + 1);
        (start, end)
    }
}
