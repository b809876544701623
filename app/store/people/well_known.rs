//! Passwords that everyone tries first, though they are long enough.
//!
//! A short list: common practice, no source. Shorter favourites are refused by their length already.

const WELL_KNOWN: &[&str] = &[
    "123456789012",
    "1234567890123",
    "12345678901234",
    "123456123456",
    "123123123123",
    "012345678910",
    "987654321098",
    "1q2w3e4r5t6y",
    "1qaz2wsx3edc",
    "q1w2e3r4t5y6",
    "qwertyuiop12",
    "qwertyuiop123",
    "qwertyuiop[]",
    "qwerty123456",
    "qwertyqwerty",
    "asdfghjkl123",
    "zxcvbnm12345",
    "abcdefghijkl",
    "abcdef123456",
    "abcd12345678",
    "password1234",
    "password12345",
    "password123!",
    "passwordpassword",
    "mypassword123",
    "p@ssw0rd1234",
    "passw0rd1234",
    "administrator",
    "administrator1",
    "admin1234567",
    "adminadminadmin",
    "welcome12345",
    "welcome123456",
    "letmein12345",
    "letmeinletmein",
    "changeme1234",
    "changemenow1",
    "iloveyou1234",
    "iloveyou12345",
    "sunshine1234",
    "football1234",
    "baseball1234",
    "princess1234",
    "dragon123456",
    "monkey123456",
    "trustno1trustno1",
    "supervisor12",
    "commissioning",
    "commissioning1",
    "engineer1234",
    "correcthorsebatterystaple",
];

/// Whether everyone would try this first: on the list, or made of fewer than five different characters.
pub(crate) fn is_well_known(password: &str) -> bool {
    let lower = password.to_lowercase();
    let mut different: Vec<char> = lower.chars().collect();
    different.sort_unstable();
    different.dedup();
    different.len() < 5 || WELL_KNOWN.contains(&lower.as_str())
}

#[cfg(test)]
mod tests {
    use super::*;

    #[test]
    fn the_list_holds_only_what_the_length_lets_through() {
        assert!(WELL_KNOWN.iter().all(|p| p.chars().count() >= 12 && *p == p.to_lowercase()));
    }

    #[test]
    fn repetition_counts_as_well_known() {
        assert!(is_well_known("aaaaaaaaaaaaaa"));
        assert!(is_well_known("Password1234"));
        assert!(!is_well_known("seven otters by the weir"));
    }
}
