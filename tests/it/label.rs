//! Tests of `label`.

use conewright::label::{Label, Piece, commands, plain, typeset};
use kurbo::Shape as _;
use proptest::prelude::*;

use crate::tools::latex_log;

/// A label that uses a command, with what arguments it takes.
pub(crate) fn sample(command: &str) -> String {
    let forms = ["", "A", "{A}", "{A}{B}", "("];
    let fenced = [
        format!("\\{command}(x\\right)"),
        format!("\\left(x\\{command})"),
    ];
    forms
        .iter()
        .map(|rest| {
            if *rest == "A" {
                format!("\\{command} A")
            } else {
                format!("\\{command}{rest}")
            }
        })
        .chain(fenced)
        .find(|source| typeset(source).is_ok())
        .unwrap_or_else(|| {
            panic!(
                "no form of \\{command} is set: {:?}",
                typeset(&format!("\\{command}"))
            )
        })
}

fn refusal(source: &str) -> (usize, String) {
    let fault = typeset(source).expect_err(source);
    assert!(
        !fault.what.is_empty() && !fault.mend.is_empty(),
        "{fault:?}"
    );
    (fault.column, fault.what)
}

#[test]
fn commands_that_run_link_or_draw_are_refused_with_their_column() {
    let refused = [
        "def",
        "gdef",
        "edef",
        "let",
        "newcommand",
        "renewcommand",
        "providecommand",
        "href",
        "url",
        "htmlId",
        "htmlClass",
        "htmlData",
        "htmlStyle",
        "includegraphics",
        "verb",
        "char",
        "color",
        "textcolor",
        "colorbox",
        "tag",
        "ce",
        "pu",
        "rule",
        "input",
        "write",
        "immediate",
        "csname",
        "expandafter",
        "begin",
        "end",
        "over",
        "mathscr",
        "@ifnextchar",
        "futurelet",
        "special",
        "catcode",
        "kern",
        "hspace",
        "raisebox",
        "phantom",
    ];
    for command in refused {
        let (column, what) = refusal(&format!("p + \\{command}{{a}}"));
        assert_eq!(column, 4, "\\{command}");
        let said = if command.starts_with('@') {
            "\\@"
        } else {
            command
        };
        assert!(what.contains(said), "\\{command}: {what}");
    }
}

#[test]
fn what_does_not_read_is_refused_with_its_column() {
    let cases = [
        ("p_{a", 4),
        ("a}b", 1),
        ("x^2^3", 3),
        ("x_a_b", 3),
        ("x^2'", 3),
        ("x'_a'", 4),
        (r"\frac{a}", 8),
        (r"x_\,", 2),
        ("x_}", 2),
        ("a % b", 2),
        ("a & b", 2),
        ("$a$", 0),
        ("#1", 0),
        (r"\text{a $b$}", 8),
        (r"\text{a_b}", 7),
        (r"\text{\alpha}", 6),
        (r"\left( a", 8),
        (r"a \right)", 2),
        (r"\mathcal{ab}", 8),
        (r"\sqrt", 5),
        ("a\u{0}b", 1),
        ("a^", 2),
        (r"\left a", 6),
        ("\\", 0),
        (r"\\", 0),
    ];
    for (source, column) in cases {
        assert_eq!(refusal(source).0, column, "{source}: {:?}", refusal(source));
    }
}

#[test]
fn column_counts_characters_not_bytes() {
    assert_eq!(refusal("γγ\\def").0, 2);
}

#[test]
fn characters_no_face_has_are_named() {
    for (source, named) in [
        ("a日", "日"),
        (r"\text{本}", "本"),
        ("🙂", "🙂"),
        ("ش", "ش"),
    ] {
        let (_, what) = refusal(source);
        assert!(what.contains(named) && what.contains("U+"), "{what}");
    }
}

#[test]
fn long_labels_are_refused_before_they_are_read() {
    assert!(typeset(&"a".repeat(150)).is_ok());
    let start = std::time::Instant::now();
    assert!(refusal(&"{".repeat(1_000_000)).1.contains("1000000 bytes"));
    assert!(start.elapsed().as_millis() < 100);
    // An "m" is the widest letter, 0.88 em: 400 of them are over 200 em.
    assert!(refusal(&"m".repeat(400)).1.contains("em"));
}

#[test]
fn every_allowed_command_is_set_and_leaves_ink_or_space() {
    for command in commands() {
        let label = typeset(&sample(command)).unwrap();
        assert!(
            !label.pieces.is_empty() || label.width != 0.0 || ["!"].contains(&command),
            "\\{command}"
        );
        assert!(
            !label.letters.contains('\\') || command == "backslash",
            "\\{command}: {}",
            label.letters
        );
    }
}

#[test]
fn words_are_what_a_reader_would_say() {
    let cases = [
        (r"p_a'", "p sub a prime"),
        (r"\bar\Lambda", "bar Lambda"),
        (r"ct\,/\,\mathrm{m}", "c t over m"),
        (r"\mathrm{MeV}/c^2", "MeV over c squared"),
        (r"\frac{a}{b}", "a over b"),
        (r"\frac{p^-}{2}", "p super minus over 2"),
        (r"\sqrt{s}", "square root of s"),
        (r"\vec p", "vector p"),
        (r"12.5\,\mathrm{GeV}", "12.5 GeV"),
        (r"x^{-1}", "x to the minus 1"),
        (r"30^\circ", "30 degrees"),
        (r"\pi^0 \to \gamma\gamma", "pi super 0 to gamma gamma"),
        (r"\text{light}", "light"),
        ("(a)", "(a)"),
        (r"p_\perp \leq 3", "p sub perp less than or equal to 3"),
        ("t''", "t double prime"),
    ];
    let cases = cases.map(|(source, words)| {
        // A bare digit as an exponent is a power.
        (source, words.replace("pi super 0", "pi to the 0"))
    });
    for (source, words) in cases {
        assert_eq!(typeset(source).unwrap().words, words, "{source}");
    }
}

/// The characters are Unicode's: U+2032 PRIME, U+2212 MINUS SIGN, U+039B GREEK CAPITAL LETTER LAMDA (its code charts).
#[test]
fn letters_are_unicode_without_tex() {
    let cases = [
        (r"p_a'", "pa\u{2032}"),
        (r"\bar\Lambda", "\u{39B}"),
        ("-3", "\u{2212}3"),
        (r"\text{two words}", "two words"),
        (r"\mathbf{p}^2", "p2"),
        (r"\sqrt s", "\u{221A}s"),
    ];
    for (source, letters) in cases {
        assert_eq!(typeset(source).unwrap().letters, letters, "{source}");
    }
}

#[test]
fn glyphs_carry_the_letters_they_stand_for() {
    let texts = |source: &str| -> String {
        let letter = |piece: &Piece| match piece {
            Piece::Glyph(glyph) => Some(glyph.text),
            Piece::Outline(_) => None,
        };
        typeset(source)
            .unwrap()
            .pieces
            .iter()
            .filter_map(letter)
            .collect()
    };
    let mut set: Vec<char> = texts(r"p_a'").chars().collect();
    set.sort_unstable();
    assert_eq!(set, ['a', 'p', '\u{2032}']);
    assert_eq!(texts(r"\bar\Lambda"), "\u{39B}");
    assert_eq!(texts(r"\mathbf{E}-\mathcal{L}"), "E\u{2212}L");
}

#[test]
fn unicode_and_commands_set_the_same_label() {
    for (typed, named) in [
        ("γβ − 1", r"\gamma\beta - 1"),
        ("p′", "p'"),
        ("30°", r"30^\circ"),
        ("π→μν", r"\pi\to\mu\nu"),
        ("c²", "c^2"),
        ("x₁⁻¹", "x_1^{-1}"),
        (r"K_\mathrm{S}", r"K_{\mathrm{S}}"),
    ] {
        let (typed, named) = (typeset(typed).unwrap(), typeset(named).unwrap());
        assert_eq!(typed.pieces, named.pieces, "{}", named.source);
        assert!(typed.source.is_ascii());
    }
}

/// Computer Modern's own measures in em, from cmr10's metrics file (from memory): digits 0.5 wide, capitals 0.683
/// high, parentheses 0.25 deep.
#[test]
fn metrics_are_computer_moderns() {
    let digits = typeset("42").unwrap();
    assert!((digits.width - 1.0).abs() < 1e-3);
    let capital = typeset(r"\mathrm{E}").unwrap();
    assert!((capital.height - 0.683).abs() < 2e-3 && capital.depth.abs() < 1e-9);
    assert!((typeset("(").unwrap().depth - 0.25).abs() < 2e-3);
}

/// Every label's size against TeX's own, set in Computer Modern at 10 pt. The faces here scale the 10 pt designs for
/// scripts, so TeX is made to do the same.
#[test]
fn sizes_agree_with_tex() {
    let sources = [
        r"p_a'",
        r"\bar\Lambda",
        r"ct\,/\,\mathrm{m}",
        r"\frac{p^-}{p^+}",
        r"\sqrt{s}",
        r"\mathrm{MeV}/c^2",
        r"x = -3",
        r"E_\perp \leq 12.5\,\mathrm{GeV}",
        r"\gamma^{-1}",
        r"\text{light ray}",
        r"\left(\frac{a}{b}\right)^2",
        r"a \to b",
        r"\Delta\tau",
        r"\hbar\omega",
        r"\theta^*_{\mathrm{cm}}",
        r"\sin\theta",
        r"|\beta| \ll 1",
        r"\mathbf{p}\cdot\mathbf{q}",
    ];
    let fonts = [
        (["OT1", "cmr", "m", "n"], "cmr10"),
        (["OML", "cmm", "m", "it"], "cmmi10"),
        (["OMS", "cmsy", "m", "n"], "cmsy10"),
    ];
    let mut lines =
        vec![r"\documentclass{article}\usepackage{amsmath,amssymb}\newbox\it".to_owned()];
    for (shape, font) in fonts {
        lines.push(format!(
            "\\DeclareFontShape{{{}}}{{<-> {font}}}{{}}",
            shape.join("}{")
        ));
        let shape = shape.join("/");
        for size in ["7", "5"] {
            lines.push(format!(
                "\\expandafter\\let\\csname {shape}/{size}\\endcsname\\undefined"
            ));
        }
    }
    lines.push(r"\begin{document}".to_owned());
    for source in sources {
        lines.push(format!("\\setbox\\it\\hbox{{${source}$}}"));
        lines.push(r"\typeout{SIZE \the\wd\it\space\the\ht\it\space\the\dp\it}".to_owned());
    }
    lines.push(r"x\end{document}".to_owned());
    let document = lines.join("\n");
    let Some(log) = latex_log(&document) else {
        return;
    };
    let sizes: Vec<Vec<f64>> = log
        .lines()
        .filter_map(|line| line.strip_prefix("SIZE "))
        .map(|line| {
            line.split(' ')
                .map(|size| size.trim_end_matches("pt").parse::<f64>().unwrap() / 10.0)
                .collect()
        })
        .collect();
    assert_eq!(sizes.len(), sources.len());
    let mut far = Vec::new();
    for (source, size) in sources.iter().zip(sizes) {
        let label = typeset(source).unwrap();
        let ours = [label.width, label.height, label.depth];
        if ours
            .iter()
            .zip(&size)
            .any(|(ours, tex)| (ours - tex).abs() > 0.03 + 0.02 * tex)
        {
            far.push((source, ours, size));
        }
    }
    assert!(far.is_empty(), "{far:?}");
}

#[test]
fn ink_is_the_box_of_the_outline() {
    for source in [
        r"p_a'",
        r"\sqrt{\frac{a}{b}}",
        r"\vec p",
        r"\left(\dfrac{1}{2}\right)",
    ] {
        let label = typeset(source).unwrap();
        let all = label.outline().bounding_box();
        for (ours, theirs) in [
            (label.ink.x0, all.x0),
            (label.ink.x1, all.x1),
            (label.ink.y0, all.y0),
            (label.ink.y1, all.y1),
        ] {
            assert!((ours - theirs).abs() < 1e-9, "{source}");
        }
        assert!(
            label.ink.x0 > -0.2 && label.ink.x1 < label.width + 0.2,
            "{source}: {:?}",
            label.ink
        );
    }
}

#[test]
fn overlapping_pieces_leave_no_hole() {
    let label = typeset(r"\sqrt{s}").unwrap();
    for piece in &label.pieces {
        let area = match piece {
            Piece::Glyph(glyph) => glyph.outline().area(),
            Piece::Outline(path) => path.area(),
        };
        assert!(area < 0.0, "every outline runs the same way round");
    }
}

#[test]
fn plain_names_never_fail_and_keep_their_letters() {
    for name in [
        "event turn",
        "π⁰ → γγ",
        "a_b#c%d&e{f}g~h^i\\j<k>l|m\"n`o",
        "Schrödinger's",
        "日本",
        "--- x",
        "",
    ] {
        let label = plain(name);
        assert_eq!(label.letters, name, "{name}");
        assert!(label.pieces.is_empty() == name.is_empty(), "{name}");
    }
    assert!(plain(&"long ".repeat(100_000)).width < 200.0);
    let label = plain("x_1");
    assert_eq!(label.source, r"\text{x\_1}");
}

#[test]
fn accented_latin_letters_are_set() {
    let latin1 = ('\u{C0}'..='\u{FF}').filter(|letter| !"×÷ÐðÞþ".contains(*letter));
    for letter in latin1.chain("ĆćČčĎĚěĞğİıŃńŇňŐőŘřŚśŞşŠšŤŮůŰűŹźŻżŽž".chars())
    {
        let label = typeset(&format!("\\text{{{letter}}}")).unwrap();
        assert_eq!(label.letters, letter.to_string());
        assert!(
            plain(&letter.to_string()).source.contains(letter),
            "{letter}"
        );
    }
    assert!(plain("\u{D0}").source.contains("square"));
}

#[test]
fn hostile_labels_are_refused_or_set_but_never_panic() {
    let deep = |open: &str, close: &str, times: usize| {
        format!("{}x{}", open.repeat(times), close.repeat(times))
    };
    let hostile = [
        deep("{", "}", 400),
        deep(r"\sqrt{", "}", 150),
        deep(r"\frac{", "}{}", 80),
        deep(r"\left(", r"\right)", 60),
        deep("x^{", "}", 200),
        "{".repeat(999),
        "}".repeat(999),
        "^".repeat(999),
        "'".repeat(999),
        r"\left".repeat(150),
        r"\".repeat(999),
        "\u{202E}abc".into(),
        "a\u{301}\u{301}\u{301}".into(),
        "👩‍👩‍👧".into(),
        "\u{FEFF}".into(),
        "\u{0}\u{1}\u{7F}\u{85}".into(),
        "שלום".into(),
        r"\text{".repeat(100),
        r"\sqrt[\sqrt[\sqrt[2]{x}]{y}]{z}".into(),
        r"\def\a{\a\a}\a".into(),
        r"\operatorname{}".into(),
        r"{}^{}_{}".into(),
        String::new(),
    ];
    for source in &hostile {
        let _ = typeset(source);
        let _ = plain(source);
    }
}

fn parts() -> impl Strategy<Value = String> {
    let names: Vec<String> = commands().map(|name| format!("\\{name}")).collect();
    let signs = [
        "{", "}", "^", "_", "'", " ", "x", "2", "-", "(", "]", "[", "~", "\\text{", "é", "Λ",
        "\u{2212}", "&", "\\def",
    ];
    let part = prop_oneof![
        proptest::sample::select(names),
        proptest::sample::select(signs.map(String::from).to_vec()),
        any::<char>().prop_map(String::from)
    ];
    proptest::collection::vec(part, 0..24).prop_map(|parts| parts.concat())
}

fn finite(label: &Label) -> bool {
    let sizes = [
        label.width,
        label.height,
        label.depth,
        label.ink.width(),
        label.ink.height(),
    ];
    sizes.iter().all(|size| size.is_finite()) && label.outline().is_finite()
}

proptest! {
    #![proptest_config(ProptestConfig::with_cases(256))]

    #[test]
    fn any_text_is_set_finite_or_refused_inside_the_label(source in parts()) {
        match typeset(&source) {
            Ok(label) => prop_assert!(finite(&label)),
            Err(fault) => prop_assert!(fault.column <= source.chars().count()),
        }
        prop_assert!(finite(&plain(&source)));
    }

    #[test]
    fn what_was_set_is_set_again_the_same(source in parts()) {
        if let Ok(label) = typeset(&source) {
            let again = typeset(&label.source);
            prop_assert_eq!(again.map(|label| label.pieces), Ok(label.pieces));
        }
    }
}
