//! Tests of `outside`.
