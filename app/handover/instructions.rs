//! How a client verifies a package with common tools and no program of ours: five commands.

/// What each command shows, and the command; run in the package's folder by any POSIX shell.
pub(crate) const COMMANDS: &[(&str, &str)] = &[
    ("No file was changed since the package was made.", "sha256sum -c SHA256SUMS"),
    (
        "The list of sums was signed with the key of this package.",
        "openssl pkeyutl -verify -pubin -inkey signing-key.pem -rawin -in SHA256SUMS -sigfile SHA256SUMS.sig",
    ),
    (
        "The key is the one whose fingerprint is printed in the document: compare by eye.",
        "openssl pkey -pubin -in signing-key.pem -outform DER | sha256sum",
    ),
    (
        "Every event follows from the one before; the last line of each file is its head: compare with the document by eye.",
        r#"for f in events/*.events; do last=-; c=0; while IFS="$(printf '\t')" read -r n p h e; do [ "$p" = "$last" ] && [ "$(printf '%s\n%s' "${p#-}" "$e" | sha256sum | cut -c1-64)" = "$h" ] || echo "$f: event $n does not follow"; last=$h; c=$n; done < "$f"; echo "$f ends at $c $last"; done"#,
    ),
    (
        "The data attached to the document is the record.json beside it.",
        "pdfdetach -save 1 -o attached.json handover.pdf && cmp attached.json record.json && rm attached.json && echo equal",
    ),
];

/// The text of `how-to-verify.txt`.
pub(crate) fn text(tag: &str, fingerprint: &str, head: &str, site_head: &str) -> String {
    use std::fmt::Write as _;
    let mut text = format!(
        "How to verify this handover package of {tag}\n\n\
         Needed: a POSIX shell with coreutils, openssl 3 and, for the last command, poppler-utils.\n\
         Run each command in this folder. A proof is worth as much as the printed figures it is compared with:\n\
         take them from a printed or separately received copy of the document.\n\n"
    );
    for (n, (what, command)) in COMMANDS.iter().enumerate() {
        let _ = writeln!(text, "{}. {what}\n\n    {command}\n", n + 1);
    }
    let _ = write!(
        text,
        "Printed in the document, and the same here:\n\n\
         key fingerprint (SHA-256)  {fingerprint}\n\
         head of the drive's chain  {head}\n\
         head of the site's chain   {site_head}\n\n\
         An event file holds one event a line: sequence, hash before (- for none), hash, canonical JSON, parted by\n\
         tabulators. The hash is SHA-256 over the hash before, a line feed, and the JSON.\n\
         What this proves: nothing here was changed since the key's owner signed it, and no event was taken out or put\n\
         in between. What it cannot prove: that the owner of the key did not write another history before a head had\n\
         left the house. Heads also stand in earlier packages and backup receipts; compare those too.\n"
    );
    text
}
