//! The page's binding: one class, each method converts, calls and converts.
//!
//! Requests come in through serde-wasm-bindgen. Answers go out as JSON text parsed by the browser's own
//! parser: it is the text the shell prints, so both show the same by construction. Building the objects one
//! property at a time takes 3.4 ms where the text takes 4.6 ms (96 findings, engine warm, Node 20), a tenth of
//! the whole assessment, which is not worth a second form of the answers. An `Error` thrown here carries the
//! whole problem as `problem`.

use leeway_api::request::{ChangeRequest, EntryRequest};
use leeway_api::response::Problem;
use serde::Serialize;
use serde::de::DeserializeOwned;
use wasm_bindgen::prelude::*;

/// The engine with its data loaded.
#[wasm_bindgen]
#[derive(Debug)]
pub struct Session {
    inner: leeway_api::Session,
}

fn thrown(problem: &Problem) -> JsValue {
    let error = js_sys::Error::new(&problem.message);
    if let Ok(value) = answer(problem) {
        // Setting a property of a fresh error cannot fail.
        let _ = js_sys::Reflect::set(&error, &JsValue::from_str("problem"), &value);
    }
    error.into()
}

fn answer<T: Serialize>(value: &T) -> Result<JsValue, JsValue> {
    let text = serde_json::to_string(value).map_err(|e| JsValue::from(js_sys::Error::new(&e.to_string())))?;
    js_sys::JSON::parse(&text)
}

fn request<T: DeserializeOwned>(value: JsValue) -> Result<T, JsValue> {
    serde_wasm_bindgen::from_value(value).map_err(|e| js_sys::Error::new(&e.to_string()).into())
}

fn hand<T: Serialize>(result: Result<T, Problem>) -> Result<JsValue, JsValue> {
    result.map_err(|p| thrown(&p)).and_then(|v| answer(&v))
}

#[wasm_bindgen]
impl Session {
    /// Loads and checks the data.
    ///
    /// # Errors
    /// Throws where the data do not load.
    #[wasm_bindgen(constructor)]
    pub fn new() -> Result<Session, JsValue> {
        leeway_api::Session::new(leeway_dataset::TEXT).map(|inner| Session { inner }).map_err(|p| thrown(&p))
    }

    /// Version of the data file.
    #[wasm_bindgen(js_name = dataVersion)]
    #[must_use]
    pub fn data_version(&self) -> String {
        self.inner.data_version().to_owned()
    }

    /// Assesses a line, given as text.
    ///
    /// # Errors
    /// Throws where the text is no line.
    pub fn assess(&self, line: &str) -> Result<JsValue, JsValue> {
        hand(self.inner.assess(line))
    }

    /// Changes that charge and gas suggest.
    ///
    /// # Errors
    /// Throws where the text is no line.
    pub fn propose(&self, line: &str) -> Result<JsValue, JsValue> {
        hand(self.inner.propose(line))
    }

    /// A reaction at given temperatures.
    ///
    /// # Errors
    /// Throws naming what does not read.
    pub fn change(&self, asked: JsValue) -> Result<JsValue, JsValue> {
        let asked: ChangeRequest = request(asked)?;
        hand(self.inner.change(&asked))
    }

    /// Substances that fit a query.
    ///
    /// # Errors
    /// Throws only if the answer cannot be handed over.
    pub fn substances(&self, query: &str) -> Result<JsValue, JsValue> {
        answer(&self.inner.substances(query))
    }

    /// One substance with its records.
    ///
    /// # Errors
    /// Throws where the data do not hold it.
    pub fn substance(&self, formula: &str) -> Result<JsValue, JsValue> {
        hand(self.inner.substance(formula))
    }

    /// Something typed into a field, understood.
    ///
    /// # Errors
    /// Throws saying what was found and expected.
    #[wasm_bindgen(js_name = readEntry)]
    pub fn read_entry(&self, asked: JsValue) -> Result<JsValue, JsValue> {
        let asked: EntryRequest = request(asked)?;
        hand(self.inner.read_entry(&asked))
    }

    /// The bytes of a file as the text of a line.
    ///
    /// # Errors
    /// Throws where the bytes are no line.
    pub fn open(&self, bytes: &[u8]) -> Result<JsValue, JsValue> {
        hand(self.inner.open(bytes))
    }

    /// The text of a line with a variant applied.
    ///
    /// # Errors
    /// Throws where the line has no such variant.
    pub fn variant(&self, line: &str, name: &str) -> Result<String, JsValue> {
        self.inner.variant(line, name).map_err(|p| thrown(&p))
    }

    /// Falls over on purpose: the page's test that a trap loses no work.
    ///
    /// # Panics
    /// Always.
    pub fn crash(&self) {
        panic!("asked to");
    }
}
