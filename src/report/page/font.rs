//! The face of the formulas, carried in the page itself: without a mathematics face brackets do not stretch and roots break.

/// Latin Modern Math, cut to what a report uses; licence in `templates/gaswright-math.licence.txt`.
const MATH_FONT: &[u8] = include_bytes!("../../../templates/gaswright-math.woff2");

/// The digits of base 64 (RFC 4648, table 1).
const DIGITS: &[u8; 64] = b"ABCDEFGHIJKLMNOPQRSTUVWXYZabcdefghijklmnopqrstuvwxyz0123456789+/";

/// The address of the face for a style sheet: the font itself.
pub(in crate::report) fn math_font() -> String {
    format!("data:font/woff2;base64,{}", base64(MATH_FONT))
}

fn base64(bytes: &[u8]) -> String {
    let mut text = String::with_capacity(bytes.len().div_ceil(3) * 4);
    for group in bytes.chunks(3) {
        let [first, second, third] = [0, 1, 2].map(|at| u32::from(group.get(at).copied().unwrap_or(0)));
        let bits = first << 16 | second << 8 | third;
        for at in 0..4 {
            let digit = DIGITS[(bits >> (18 - 6 * at) & 63) as usize];
            text.push(if at <= group.len() { char::from(digit) } else { '=' });
        }
    }
    text
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn base64_as_in_the_standard() {
        // RFC 4648, section 10.
        for (plain, coded) in [("", ""), ("f", "Zg=="), ("fo", "Zm8="), ("foo", "Zm9v"), ("foobar", "Zm9vYmFy")] {
            assert_eq!(base64(plain.as_bytes()), coded);
        }
    }

    #[test]
    fn the_font_is_a_woff2_and_small() {
        assert_eq!(&MATH_FONT[..4], b"wOF2");
        assert!(MATH_FONT.len() < 110_000);
    }
}
