//! Tests of `hostile`.
