//! Behaviour through public doors.
#![cfg(test)]

mod broken_fields;
mod cli;
mod core;
#[cfg(feature = "window")]
mod desk;
mod export;
mod facts;
mod hostile;
mod house;
mod label;
mod oracle;
mod outside;
mod plate;
mod program;
mod quantity;
mod scene;
mod solve;
mod tools;
