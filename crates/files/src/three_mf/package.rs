//! The package around the model: content types and the relationship that leads to it.

use super::{MODEL_PART, MODEL_RELATIONSHIP};

/// `[Content_Types].xml` (ISO/IEC 29500-2, section 10.1.2).
pub(super) const CONTENT_TYPES: &str = concat!(
    r#"<?xml version="1.0" encoding="UTF-8"?>"#,
    "\n",
    r#"<Types xmlns="http://schemas.openxmlformats.org/package/2006/content-types">"#,
    r#"<Default Extension="rels" ContentType="application/vnd.openxmlformats-package.relationships+xml"/>"#,
    r#"<Default Extension="model" ContentType="application/vnd.ms-package.3dmanufacturing-3dmodel+xml"/>"#,
    "</Types>\n"
);

/// `_rels/.rels` (ISO/IEC 29500-2, section 9.3).
pub(super) fn relationships() -> String {
    format!(
        concat!(
            r#"<?xml version="1.0" encoding="UTF-8"?>"#,
            "\n",
            r#"<Relationships xmlns="http://schemas.openxmlformats.org/package/2006/relationships">"#,
            r#"<Relationship Target="/{}" Id="rel0" Type="{}"/></Relationships>"#,
            "\n"
        ),
        MODEL_PART, MODEL_RELATIONSHIP
    )
}
