//! Numbers as text: the shortest that reads back as the same bits.

/// Appends a number.
pub(crate) fn write_number(out: &mut Vec<u8>, number: f64) {
    let mut buffer = ryu::Buffer::new();
    let text = buffer.format(number);
    out.extend_from_slice(text.strip_suffix(".0").unwrap_or(text).as_bytes());
}

/// Appends a field of text, in quotes if it would otherwise be taken for something else.
pub(crate) fn write_text(out: &mut Vec<u8>, text: &[u8]) {
    if !text.iter().any(|byte| matches!(byte, b',' | b'"' | b'\r' | b'\n')) {
        out.extend_from_slice(text);
        return;
    }
    out.push(b'"');
    for &byte in text {
        if byte == b'"' {
            out.push(b'"');
        }
        out.push(byte);
    }
    out.push(b'"');
}

#[cfg(test)]
mod tests {
    use super::*;

    fn written(number: f64) -> String {
        let mut out = Vec::new();
        write_number(&mut out, number);
        String::from_utf8(out).unwrap()
    }

    #[test]
    fn every_number_reads_back_as_the_same_bits() {
        let mut bits = 1_u64;
        for _ in 0..100_000 {
            bits = bits.wrapping_mul(6364136223846793005).wrapping_add(1442695040888963407);
            let number = f64::from_bits(bits);
            let back: f64 = written(number).parse().unwrap();
            assert!(back.to_bits() == number.to_bits() || number.is_nan(), "{number:e}");
        }
    }

    #[test]
    fn numbers_are_short() {
        let pairs = [
            (0.0, "0"),
            (-0.0, "-0"),
            (100.0, "100"),
            (0.1, "0.1"),
            (5e-324, "5e-324"),
            (1e300, "1e300"),
            (-2.5e-7, "-2.5e-7"),
            (f64::NAN, "NaN"),
            (f64::INFINITY, "inf"),
        ];
        for (number, text) in pairs {
            assert_eq!(written(number), text);
        }
    }

    #[test]
    fn texts_read_back_as_they_were() {
        for text in ["", "plain", "a,b", "say \"so\"", "two\nlines"] {
            let mut out = Vec::new();
            write_text(&mut out, text.as_bytes());
            out.extend_from_slice(b",end");
            let mut reader = csv::ReaderBuilder::new().has_headers(false).from_reader(&out[..]);
            let row = reader.records().next().unwrap().unwrap();
            assert_eq!(row, vec![text, "end"]);
        }
    }
}
