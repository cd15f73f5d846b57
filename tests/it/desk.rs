//! Tests of `desk`: the window's behaviour by accessible names, without a display, and its pictures.

mod canvas;
mod harness;
mod pictures;
mod rail;
mod tables;
mod window;
