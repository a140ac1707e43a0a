//! What is wrong with a part file, where, and what to do about it.

use crate::source::Source;
use std::fmt;
use std::ops::Range;
use std::sync::Arc;

/// Faults that are shown; the number of the others is.
const SHOWN: usize = 50;

/// Characters of a message or of advice at most.
const TOLD: usize = 800;

/// Faults after which reading stops: more would take time and memory and help nobody.
const ENOUGH: usize = 1000;

/// A place in the text, in bytes.
pub type Span = Range<usize>;

/// A place in the text and a few words about it.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Label {
    /// The bytes to underline.
    pub span: Span,
    /// What to say there; may be empty.
    pub text: String,
}

/// One thing that is wrong with a part file.
#[derive(Debug, Clone, PartialEq, Eq)]
pub struct Fault {
    /// Which rule is broken, for tests and for looking it up: `part::unknown_key`, `outline::corner_too_large`...
    pub code: &'static str,
    /// What is wrong, in one sentence without a full stop.
    pub message: String,
    /// Where; the first is the place that the fault is reported at.
    pub labels: Vec<Label>,
    /// What to do.
    pub help: Option<String>,
}

impl Fault {
    /// A fault at `span`, with `text` beside the underline.
    pub fn new(
        code: &'static str,
        message: impl Into<String>,
        span: Span,
        text: impl Into<String>,
    ) -> Self {
        Self {
            code,
            message: message.into(),
            labels: vec![Label {
                span,
                text: text.into(),
            }],
            help: None,
        }
    }

    /// The same fault with a further place.
    #[must_use]
    pub fn also(mut self, span: Span, text: impl Into<String>) -> Self {
        self.labels.push(Label {
            span,
            text: text.into(),
        });
        self
    }

    /// The same fault with advice.
    #[must_use]
    pub fn help(mut self, help: impl Into<String>) -> Self {
        self.help = Some(help.into());
        self
    }
}

/// Faults as they are found, in any order.
#[derive(Debug, Default)]
pub(crate) struct Found {
    faults: Vec<Fault>,
    /// How many there were, those among them that have been dropped included.
    count: usize,
}

impl Found {
    pub(crate) fn push(&mut self, fault: Fault) {
        self.count += 1;
        if !self.is_enough() {
            self.faults.push(fault);
        }
    }

    pub(crate) fn extend(&mut self, faults: impl IntoIterator<Item = Fault>) {
        for fault in faults {
            self.push(fault);
        }
    }

    /// How many have been found.
    pub(crate) fn count(&self) -> usize {
        self.count
    }

    /// True where there are so many that the rest need not be read.
    pub(crate) fn is_enough(&self) -> bool {
        self.count >= ENOUGH
    }

    pub(crate) fn is_empty(&self) -> bool {
        self.faults.is_empty()
    }

    /// The codes of the faults, in the order in which they were found.
    #[cfg(test)]
    pub(crate) fn codes(&self) -> Vec<&'static str> {
        self.faults.iter().map(|fault| fault.code).collect()
    }

    /// Drops the faults with these codes: they may be consequences of others.
    pub(crate) fn drop_codes(&mut self, codes: &[&str]) {
        self.faults.retain(|fault| !codes.contains(&fault.code));
    }
}

/// All that is wrong with one part file, in order of place; at most fifty, and then one that says how many more there are.
/// Never empty.
///
/// Each of the [diagnostics](Self::diagnostics) shows the file's lines with the place underlined.
#[derive(Clone)]
pub struct Faults {
    source: Arc<Source>,
    faults: Vec<Located>,
}

/// A fault with the text that it points into, as miette wants it.
#[derive(Clone)]
struct Located {
    fault: Fault,
    source: Arc<Source>,
}

/// A message as it is shown: what it repeats of the file is not endless and commands no terminal.
fn told(message: &str) -> String {
    let mut told: String = message
        .chars()
        .take(TOLD)
        .map(|c| if c.is_control() { ' ' } else { c })
        .collect();
    if told.len() < message.len() {
        told.push('…');
    }
    told
}

impl Faults {
    /// The faults of the text `text` of the file `file` (a name for people); `None` where there are none.
    pub fn of(file: &str, text: &str, faults: Vec<Fault>) -> Option<Self> {
        let mut found = Found::default();
        found.extend(faults);
        Self::gather(file, text.to_owned(), found)
    }

    /// As [`Self::of`], of faults found while reading.
    pub(crate) fn gather(file: &str, text: String, found: Found) -> Option<Self> {
        let stopped = found.is_enough();
        let mut faults = found.faults;
        if faults.is_empty() {
            return None;
        }
        faults.sort_by_key(|fault| fault.labels.first().map_or(0, |label| label.span.start));
        if faults.len() > SHOWN {
            let more = faults.len() - SHOWN;
            let more = if stopped {
                "many more faults, and the rest of the file has not been read".to_owned()
            } else {
                format!("{more} more faults that are not shown")
            };
            faults.truncate(SHOWN);
            faults.push(Fault {
                code: "part::more_faults",
                message: format!("and {more}"),
                labels: Vec::new(),
                help: Some("mend the first ones and run it again: many may have one cause".into()),
            });
        }
        let source = Arc::new(Source::new(file, text));
        let faults = faults
            .into_iter()
            .map(|mut fault| {
                fault.message = told(&fault.message);
                fault.help = fault.help.as_deref().map(told);
                for label in &mut fault.labels {
                    label.span = source.underlined(&label.span);
                    label.text = told(&label.text);
                }
                Located {
                    fault,
                    source: Arc::clone(&source),
                }
            })
            .collect();
        Some(Self { source, faults })
    }

    /// The faults, in order of place.
    pub fn iter(&self) -> impl Iterator<Item = &Fault> {
        self.faults.iter().map(|located| &located.fault)
    }

    /// The name of the file.
    pub fn file(&self) -> &str {
        self.source.name()
    }
}

impl fmt::Debug for Faults {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.debug_struct("Faults")
            .field("file", &self.file())
            .field("faults", &self.iter().collect::<Vec<_>>())
            .finish()
    }
}

impl fmt::Display for Faults {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        match self.faults.len() {
            1 => write!(f, "{}", self.faults[0].fault.message),
            n => write!(f, "{n} faults in {}", self.file()),
        }
    }
}

impl std::error::Error for Faults {}

impl Faults {
    /// Each fault as a diagnostic of its own that carries the text it points into.
    pub fn diagnostics(&self) -> impl Iterator<Item = &(dyn miette::Diagnostic + '_)> {
        self.faults
            .iter()
            .map(|located| located as &dyn miette::Diagnostic)
    }
}

impl fmt::Debug for Located {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        fmt::Debug::fmt(&self.fault, f)
    }
}

impl fmt::Display for Located {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(&self.fault.message)
    }
}

impl std::error::Error for Located {}

impl miette::Diagnostic for Located {
    fn code<'a>(&'a self) -> Option<Box<dyn fmt::Display + 'a>> {
        Some(Box::new(self.fault.code))
    }

    fn help<'a>(&'a self) -> Option<Box<dyn fmt::Display + 'a>> {
        self.fault
            .help
            .as_ref()
            .map(|help| Box::new(help) as Box<dyn fmt::Display>)
    }

    fn source_code(&self) -> Option<&dyn miette::SourceCode> {
        Some(&*self.source)
    }

    fn labels(&self) -> Option<Box<dyn Iterator<Item = miette::LabeledSpan> + '_>> {
        // The first label is the place that the fault is reported at, wherever the others are.
        Some(Box::new(self.fault.labels.iter().enumerate().map(
            |(i, label)| {
                let text = (!label.text.is_empty()).then(|| label.text.clone());
                let span = (label.span.start, label.span.len());
                if i == 0 {
                    miette::LabeledSpan::new_primary_with_span(text, span)
                } else {
                    miette::LabeledSpan::new_with_span(text, span)
                }
            },
        )))
    }
}
