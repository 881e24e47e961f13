//! The shell's binding: words to a request, the answer to text or JSON, an exit code. It decides nothing.

mod args;
mod files;
mod paper;

use args::{Args, Colour, Command};
use clap::Parser;
use leeway_api::request::ChangeRequest;
use leeway_api::response::{Assessment, Problem};
use leeway_api::{Opened, Session, line_of};
use paper::Paper;
use serde::Serialize;
use std::io::{IsTerminal, Write};
use std::path::Path;
use std::process::ExitCode;

/// Bad input.
const BAD_INPUT: u8 = 2;
/// A finding is off side, asked for strictly.
const OFF_SIDE: u8 = 1;

fn main() -> ExitCode {
    let args = match Args::try_parse() {
        Ok(args) => args,
        Err(e) => return words(&e),
    };
    let wanted = |terminal: bool| match args.color {
        Colour::Always => true,
        Colour::Never => false,
        Colour::Auto => terminal && std::env::var_os("NO_COLOR").is_none_or(|v| v.is_empty()),
    };
    let colour = wanted(std::io::stdout().is_terminal());
    let file = match &args.command {
        Command::Assess { line, .. } | Command::Propose { line, .. } => match line.display().to_string() {
            dash if dash == "-" => "standard input".to_owned(),
            name => name,
        },
        _ => String::new(),
    };
    match run(&args.command, colour) {
        Ok(answer) => {
            let code = write_out(&answer.text, answer.code);
            if answer.refused.is_empty() { code } else { bad_input(&file, &answer.refused) }
        }
        Err(problems) => bad_input(&file, &problems),
    }
}

/// Help and version to standard output; words that are no command to standard error, in the voice of the rest.
fn words(e: &clap::Error) -> ExitCode {
    if !e.use_stderr() {
        return write_out(&e.render().to_string(), 0);
    }
    let text = e.render().to_string();
    let text = text.strip_prefix("error: ").map_or(text.clone(), |t| format!("leeway: {t}"));
    let _ = std::io::stderr().write_all(text.as_bytes());
    ExitCode::from(BAD_INPUT)
}

/// Says on standard error what is wrong, where, and what mends it.
fn bad_input(file: &str, problems: &[Problem]) -> ExitCode {
    let mut paper = Paper::new(false);
    for p in problems {
        paper.problem(file, p);
        for more in &p.more {
            paper.problem(file, more);
        }
    }
    // A closed standard error leaves nothing to say it to.
    let _ = std::io::stderr().write_all(paper.into_text().as_bytes());
    ExitCode::from(BAD_INPUT)
}

/// Writes to standard output; a reader that went away is no fault of ours.
fn write_out(text: &str, code: u8) -> ExitCode {
    let mut out = std::io::stdout().lock();
    match out.write_all(text.as_bytes()).and_then(|()| out.flush()) {
        Err(e) if e.kind() != std::io::ErrorKind::BrokenPipe => {
            let _ = writeln!(std::io::stderr(), "leeway: standard output takes no more: {e}");
            ExitCode::from(BAD_INPUT)
        }
        _ => ExitCode::from(code),
    }
}

/// What goes to standard output, and what of a line could not be taken: the rest of it is judged all the same.
struct Answer {
    text: String,
    code: u8,
    refused: Vec<Problem>,
}

impl Answer {
    fn done(text: String) -> Self {
        Self { text, code: 0, refused: Vec::new() }
    }
}

fn run(command: &Command, colour: bool) -> Result<Answer, Vec<Problem>> {
    let one = |p: Problem| vec![p];
    let session = Session::new(leeway_dataset::TEXT).map_err(one)?;
    let mut paper = Paper::new(colour);
    match command {
        Command::Assess { line, json, strict, variant, zone, change } => {
            let opened = open(&session, line)?;
            let mut text = opened.text;
            if let Some(name) = variant {
                text = session.variant(&text, name).map_err(one)?;
            }
            let mut assessment = session.assess(&text).map_err(one)?;
            // What was noticed of the bytes; what was noticed of the line the assessment says itself.
            assessment.notes.extend(opened.notes.into_iter().filter(|n| n.at.is_empty()));
            let mut refused = refused(&assessment);
            if variant.is_none() {
                // The text of a variant is not the text of the file: its lines would mislead.
                refused.iter_mut().for_each(|p| place_in_file(p, &text));
            }
            known_name(zone.as_deref(), assessment.zones.iter().map(|z| z.name.as_str()), "zone").map_err(one)?;
            known_name(change.as_deref(), assessment.changes.iter().map(|c| c.name.as_str()), "change").map_err(one)?;
            let code =
                if *strict && assessment.summary.worst.is_some_and(|w| assessment.findings[w].standing == "off side") {
                    OFF_SIDE
                } else {
                    0
                };
            if *json {
                return Ok(Answer { text: as_json(&assessment)?, code, refused });
            }
            paper.assessment(&assessment, zone.as_deref(), change.as_deref());
            Ok(Answer { text: paper.into_text(), code, refused })
        }
        Command::Change { equation, at, activity, dh, ds, json } => {
            let request = ChangeRequest {
                equation: equation.clone(),
                at: at.clone(),
                activities: activity.clone(),
                dh: dh.clone(),
                ds: ds.clone(),
            };
            let reactions = session.change(&request).map_err(one)?;
            if *json {
                return Ok(Answer::done(as_json(&reactions)?));
            }
            paper.reactions(&reactions);
            Ok(Answer::done(paper.into_text()))
        }
        Command::Propose { line, json } => {
            let proposals = session.propose(&open(&session, line)?.text).map_err(one)?;
            if *json {
                return Ok(Answer::done(as_json(&proposals)?));
            }
            paper.proposals(&proposals);
            Ok(Answer::done(paper.into_text()))
        }
        Command::Substances { query, elements, json } => {
            let exact = query.as_deref().filter(|q| elements.is_none() && session.book().find(q.trim()).is_some());
            if let Some(formula) = exact {
                let substance = session.substance(formula).map_err(one)?;
                if *json {
                    return Ok(Answer::done(as_json(&substance)?));
                }
                paper.substance(&substance);
                return Ok(Answer::done(paper.into_text()));
            }
            let asked = elements.as_deref().or(query.as_deref()).unwrap_or("");
            let rows = session.substances(asked);
            if rows.is_empty() {
                // The session's own words for a formula that is not held.
                return Err(session.substance(asked).err().into_iter().collect());
            }
            if *json {
                return Ok(Answer::done(as_json(&rows)?));
            }
            paper.rows(&rows);
            Ok(Answer::done(paper.into_text()))
        }
    }
}

fn open(session: &Session, path: &Path) -> Result<Opened, Vec<Problem>> {
    let bytes = files::read(path).map_err(|p| vec![p])?;
    session.open(&bytes).map_err(|p| vec![p])
}

/// Everything a line could not be taken for.
fn refused(a: &Assessment) -> Vec<Problem> {
    let zones = a.zones.iter().filter_map(|z| z.refused.clone());
    zones.chain(a.changes.iter().filter_map(|c| c.refused.clone())).collect()
}

/// Adds the line of the file, which the engine has no business to know.
fn place_in_file(p: &mut Problem, text: &str) {
    if let Some(line) = line_of(text, &p.at)
        && !p.place.contains("line ")
    {
        p.place += &format!("; line {line}");
    }
}

fn known_name<'n>(
    asked: Option<&str>,
    mut names: impl Iterator<Item = &'n str> + Clone,
    what: &str,
) -> Result<(), Problem> {
    let Some(asked) = asked else { return Ok(()) };
    let all = names.clone().collect::<Vec<_>>().join("; ");
    if names.any(|n| n == asked) {
        return Ok(());
    }
    Err(Problem {
        code: "line.name".to_owned(),
        at: String::new(),
        place: what.to_owned(),
        message: format!("found the {what} \u{201c}{asked}\u{201d}, expected one of: {all}"),
        found: asked.to_owned(),
        expected: all,
        hints: Vec::new(),
        more: Vec::new(),
    })
}

fn as_json<T: Serialize>(value: &T) -> Result<String, Vec<Problem>> {
    serde_json::to_string_pretty(value)
        .map(|mut t| {
            t.push('\n');
            t
        })
        .map_err(|e| {
            vec![Problem {
                code: "json".to_owned(),
                at: String::new(),
                place: String::new(),
                message: e.to_string(),
                found: String::new(),
                expected: String::new(),
                hints: Vec::new(),
                more: Vec::new(),
            }]
        })
}
