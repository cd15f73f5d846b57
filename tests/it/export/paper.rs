//! PDF and TikZ, read by other programs.

use std::path::Path;

use super::*;
use crate::label::sample;
use crate::tools::{latex_log, printed, tool};

#[test]
fn hostile_names_do_not_break_pdf_or_png() {
    let bytes = export::pdf(&nasty(), Lettering::Usual).unwrap();
    hayro::hayro_syntax::Pdf::new(bytes.clone()).unwrap();
    check_with_qpdf(&bytes);
    let bytes = export::png(&nasty(), 72.0).unwrap();
    image::load_from_memory(&bytes).unwrap();
}

fn with_pdf(bytes: &[u8], read: impl FnOnce(&Path) -> String) -> String {
    let file = tempfile::Builder::new().suffix(".pdf").tempfile().unwrap();
    std::fs::write(file.path(), bytes).unwrap();
    read(file.path())
}

fn check_with_qpdf(bytes: &[u8]) {
    let Some(mut qpdf) = tool("qpdf") else { return };
    let said = with_pdf(bytes, |path| printed(qpdf.arg("--check").arg(path)));
    assert!(
        said.contains("No syntax or stream encoding errors") && !said.contains("WARNING"),
        "{said}"
    );
}

#[test]
fn pdf_is_sound() {
    check_with_qpdf(&export::pdf(&every_kind(), Lettering::Usual).unwrap());
    check_with_qpdf(&export::pdf(&every_kind(), Lettering::Outline).unwrap());
}

#[test]
fn pdf_has_its_size_title_and_words() {
    let Some(mut info) = tool("pdfinfo") else {
        return;
    };
    let bytes = export::pdf(&every_kind(), Lettering::Usual).unwrap();
    let said = with_pdf(&bytes, |path| printed(info.arg(path)));
    assert!(
        said.lines()
            .any(|line| line.starts_with("Title:") && line.ends_with("Kinds of marks")),
        "{said}"
    );
    assert!(
        said.lines()
            .any(|line| line.starts_with("Tagged:") && line.ends_with("yes")),
        "{said}"
    );
    // 86 mm and 60 mm in points of 1/72 inch.
    assert!(said.contains("243.78 x 170.079 pts"), "{said}");
    assert!(!said.contains("CreationDate"));
    let structure = with_pdf(&bytes, |path| {
        printed(tool("pdfinfo").unwrap().arg("-struct").arg(path))
    });
    assert!(structure.contains("Figure"), "{structure}");
}

#[test]
fn pdf_embeds_subsets_of_true_type_faces() {
    let Some(mut fonts) = tool("pdffonts") else {
        return;
    };
    let said = with_pdf(
        &export::pdf(&every_kind(), Lettering::Usual).unwrap(),
        |path| printed(fonts.arg(path)),
    );
    let rows: Vec<&str> = said.lines().skip(2).collect();
    assert!(rows.len() >= 2, "{said}");
    for row in rows {
        assert!(
            row.contains("CID TrueType") && row.contains("yes yes yes") && !row.contains("Type 3"),
            "{row}"
        );
    }
    let said = with_pdf(
        &export::pdf(&every_kind(), Lettering::Outline).unwrap(),
        |path| printed(tool("pdffonts").unwrap().arg(path)),
    );
    assert_eq!(said.lines().skip(2).count(), 0, "{said}");
}

#[test]
fn pdf_text_can_be_found() {
    let Some(mut reader) = tool("pdftotext") else {
        return;
    };
    let bytes = export::pdf(&every_kind(), Lettering::Usual).unwrap();
    let said = with_pdf(&bytes, |path| printed(reader.arg(path).arg("-")));
    for found in ["pa\u{2032}", "\u{39B}", "ct / m", "event turn"] {
        assert!(said.contains(found), "{found} in {said}");
    }
    assert!(!said.contains('\\'), "{said}");
}

fn standalone(picture: &str) -> String {
    format!(
        "\\documentclass{{standalone}}\n\\usepackage{{amsmath,amssymb,tikz}}\n\\begin{{document}}\n{picture}\\end{{document}}\n"
    )
}

/// Sets a picture by pdflatex, without a warning.
fn set(picture: Vec<u8>) {
    let picture = text(picture);
    let Some(log) = latex_log(&standalone(&picture)) else {
        return;
    };
    let lines: Vec<&str> = log
        .lines()
        .filter(|line| {
            ["Warning", "Missing", "Overfull"]
                .iter()
                .any(|sign| line.contains(sign))
        })
        .collect();
    assert!(lines.is_empty(), "{lines:?}");
}

#[test]
fn tikz_is_set_without_a_warning() {
    let source = text(export::tikz(&every_kind()).unwrap());
    assert!(
        source.contains("amsmath")
            && source.contains("$p_a'$")
            && source.contains("dash pattern=on 2mm off 1mm")
    );
    set(export::tikz(&every_kind()).unwrap());
}

#[test]
fn hostile_names_do_not_break_tikz() {
    set(export::tikz(&nasty()).unwrap());
}

#[test]
fn every_allowed_command_is_set_by_tex() {
    let mut shapes = Vec::new();
    for (index, command) in commands().enumerate() {
        let (x, y) = (20.0 * (index % 10) as f64, 8.0 * (index / 10) as f64);
        let alone = sample(command);
        let as_script = format!("x_\\{command}\\sqrt\\{command}\\bar\\{command}");
        let source = if typeset(&as_script).is_ok() {
            format!("{alone} {as_script}")
        } else {
            alone
        };
        shapes.push((0, label(typeset(&source).unwrap(), x, y)));
    }
    set(export::tikz(&sheet_of(shapes)).unwrap());
}

#[test]
fn plain_names_of_all_signs_are_set_by_tex() {
    let latin: String = ('\u{20}'..='\u{17F}')
        .filter(|letter| !letter.is_control())
        .collect();
    let signs = "αβγΛ→−′°×·≤∞日-- --- ``''?`!`";
    let letters: Vec<char> = latin.chars().chain(signs.chars()).collect();
    let names = letters
        .chunks(12)
        .map(|chunk| chunk.iter().collect::<String>());
    let shapes = names
        .enumerate()
        .map(|(row, name)| (0, label(plain(&name), 2.0, 5.0 * row as f64)))
        .collect();
    set(export::tikz(&sheet_of(shapes)).unwrap());
}
