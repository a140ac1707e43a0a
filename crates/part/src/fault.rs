//! What is wrong with a part file, where, and what to do about it.

use std::fmt;
use std::ops::Range;
use std::sync::Arc;

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

/// All that is wrong with one part file, in order of place. Never empty.
///
/// As a [`miette::Diagnostic`] it shows the file's lines with each place underlined.
#[derive(Clone)]
pub struct Faults {
    source: Arc<miette::NamedSource<String>>,
    faults: Vec<Located>,
}

/// A fault with the text that it points into, as miette wants it.
#[derive(Clone)]
struct Located {
    fault: Fault,
    source: Arc<miette::NamedSource<String>>,
}

impl Faults {
    /// The faults of the text `text` of the file `file` (a name for people); `None` where there are none.
    pub fn of(file: &str, text: &str, mut faults: Vec<Fault>) -> Option<Self> {
        if faults.is_empty() {
            return None;
        }
        faults.sort_by_key(|fault| fault.labels.first().map_or(0, |label| label.span.start));
        let source =
            Arc::new(miette::NamedSource::new(file, text.to_owned()).with_language("toml"));
        let faults = faults
            .into_iter()
            .map(|fault| Located {
                fault,
                source: Arc::clone(&source),
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
        Some(Box::new(self.fault.labels.iter().map(|label| {
            let text = (!label.text.is_empty()).then(|| label.text.clone());
            miette::LabeledSpan::new(text, label.span.start, label.span.len())
        })))
    }
}
