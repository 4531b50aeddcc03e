//! The file around the pages: objects gathered into packed streams, a cross-reference stream at the end.
//!
//! ISO 32000-1, 7.5.7 (object streams) and 7.5.8 (cross-reference streams).
use crate::cores::side_by_side;
use flate2::{Compress, Compression, FlushCompress, Status};
use std::ops::Range;

/// Number of an object; every object is of generation 0.
pub(super) type Number = u32;

/// A file being put together: numbers are given out first, objects follow in any order.
pub(super) struct File {
    last: Number,
    /// Objects that are no streams, one after another, each with where it ends.
    small: Vec<u8>,
    ends: Vec<(Number, usize)>,
    streams: Vec<Stream>,
}

struct Stream {
    number: Number,
    /// Entries of its dictionary but for length and filter.
    entries: String,
    packed: Vec<u8>,
    filter: &'static str,
}

/// Where an object stands.
#[derive(Clone, Copy)]
enum Place {
    Free,
    At(usize),
    In(Number, usize),
}

/// Small objects are gathered until a stream holds as many bytes as this, or as many objects.
const GATHERED: (usize, usize) = (48 << 10, 200);

const PACKED: &str = "/Filter/FlateDecode";

impl File {
    pub(super) fn new() -> Self {
        Self { last: 0, small: Vec::new(), ends: Vec::new(), streams: Vec::new() }
    }

    /// A number for an object to come.
    pub(super) fn number(&mut self) -> Number {
        self.last += 1;
        self.last
    }

    /// Numbers for several objects to come.
    pub(super) fn numbers(&mut self, count: usize) -> Range<Number> {
        let first = self.last + 1;
        self.last += count as Number;
        first..self.last + 1
    }

    /// An object that is no stream.
    pub(super) fn object(&mut self, number: Number, body: &[u8]) {
        self.small.extend_from_slice(body);
        self.ends.push((number, self.small.len()));
    }

    /// A stream: the entries of its dictionary but for length and filter, and its content, packed.
    pub(super) fn stream(&mut self, number: Number, entries: String, packed: Vec<u8>) {
        self.streams.push(Stream { number, entries, packed, filter: PACKED });
    }

    /// A stream that stands in the file as it is, so that programs which read no PDF find it (ISO 19005-2, 6.6.2.1).
    pub(super) fn plain_stream(&mut self, number: Number, entries: String, content: Vec<u8>) {
        self.streams.push(Stream { number, entries, packed: content, filter: "" });
    }

    /// The file's bytes: `root` is the catalog, `info` the information dictionary, `identity` what tells files apart.
    pub(super) fn finish(mut self, root: Number, info: Number, identity: &[u8; 16]) -> Vec<u8> {
        let mut places = vec![Place::Free; self.last as usize + 1];
        self.gather(&mut places);
        let size: usize = self.streams.iter().map(|stream| stream.packed.len() + stream.entries.len() + 80).sum();
        // The second line marks the file as binary (7.5.2).
        let mut bytes = Vec::with_capacity(size + 4096);
        bytes.extend_from_slice(b"%PDF-1.7\n%\xe2\xe3\xcf\xd3\n");
        for stream in &self.streams {
            places[stream.number as usize] = Place::At(bytes.len());
            write_stream(&mut bytes, stream);
        }
        let number = self.number();
        let start = bytes.len();
        places.push(Place::At(start));
        let id: String = identity.iter().map(|byte| format!("{byte:02x}")).collect();
        let (table, widths) = table(&places, start);
        let entries = format!(
            "/Type/XRef/Size {}/W[{} {} {}]/Root {root} 0 R/Info {info} 0 R/ID[<{id}><{id}>]",
            places.len(),
            widths[0],
            widths[1],
            widths[2]
        );
        write_stream(&mut bytes, &Stream { number, entries, packed: Packer::new().pack(&table), filter: PACKED });
        bytes.extend_from_slice(format!("startxref\n{start}\n%%EOF\n").as_bytes());
        bytes
    }

    /// Puts the small objects into streams.
    fn gather(&mut self, places: &mut Vec<Place>) {
        let small = std::mem::take(&mut self.small);
        let ends = std::mem::take(&mut self.ends);
        let (mut contents, mut from, mut first) = (Vec::new(), 0, 0);
        while first < ends.len() {
            let most = &ends[first..ends.len().min(first + GATHERED.1)];
            let count = most.iter().position(|(_, end)| end - from > GATHERED.0).map_or(most.len(), |at| at.max(1));
            let number = self.number();
            places.push(Place::Free);
            let mut content = String::new();
            let mut begin = from;
            for (place, &(object, end)) in most[..count].iter().enumerate() {
                places[object as usize] = Place::In(number, place);
                content.push_str(&format!("{object} {} ", begin - from));
                begin = end;
            }
            let entries = format!("/Type/ObjStm/N {count}/First {}", content.len());
            let mut content = content.into_bytes();
            content.extend_from_slice(&small[from..begin]);
            contents.push((number, entries, content));
            (from, first) = (begin, first + count);
        }
        let packed = side_by_side(contents.len(), Packer::new, |packer, at| packer.pack(&contents[at].2));
        for ((number, entries, _), packed) in contents.into_iter().zip(packed) {
            self.stream(number, entries, packed);
        }
    }
}

fn write_stream(bytes: &mut Vec<u8>, stream: &Stream) {
    let head = format!(
        "{} 0 obj\n<<{}{}/Length {}>>\nstream\n",
        stream.number,
        stream.entries,
        stream.filter,
        stream.packed.len()
    );
    bytes.extend_from_slice(head.as_bytes());
    bytes.extend_from_slice(&stream.packed);
    bytes.extend_from_slice(b"\nendstream\nendobj\n");
}

/// The cross-reference table and the widths of its three columns, bytes.
fn table(places: &[Place], largest: usize) -> (Vec<u8>, [usize; 3]) {
    let width = |value: usize| (usize::BITS - value.leading_zeros()).div_ceil(8).max(1) as usize;
    let widths = [1, width(largest.max(places.len())), width(GATHERED.1)];
    let mut table = Vec::with_capacity(places.len() * widths.iter().sum::<usize>());
    for place in places {
        let (kind, second, third) = match *place {
            Place::Free => (0_u8, 0, 0),
            Place::At(start) => (1, start, 0),
            Place::In(stream, place) => (2, stream as usize, place),
        };
        table.push(kind);
        for (value, width) in [(second, widths[1]), (third, widths[2])] {
            table.extend_from_slice(&(value as u64).to_be_bytes()[8 - width..]);
        }
    }
    (table, widths)
}

/// Packs one stream after another with the same tables: to clear them for every stream would cost as much as packing.
pub(super) struct Packer(Compress);

impl Packer {
    pub(super) fn new() -> Self {
        // Higher levels take twice the time for a few hundredths of the size.
        Self(Compress::new(Compression::new(LEVEL), true))
    }

    pub(super) fn pack(&mut self, content: &[u8]) -> Vec<u8> {
        self.0.reset();
        let mut packed = Vec::with_capacity(content.len() / 2 + 64);
        loop {
            let read = content.len().min(self.0.total_in() as usize);
            match self.0.compress_vec(&content[read..], &mut packed, FlushCompress::Finish) {
                Ok(Status::StreamEnd) => return packed,
                // More room, then on.
                Ok(_) => packed.reserve(content.len() / 2 + 64),
                // Only a wrong dictionary or level is an error here (flate2), and there is neither.
                Err(_) => return packed,
            }
        }
    }
}

const LEVEL: u32 = 1;
