//! Behaviour through public doors.
#![cfg(test)]

mod broken_fields;
mod cli;
mod core;
#[cfg(feature = "window")]
mod desk;
mod draws;
mod examples;
mod export;
mod facts;
mod hostile;
mod house;
mod label;
mod lettering;
mod oracle;
mod outside;
mod picture;
mod plate;
mod program;
mod quantity;
mod readback;
mod scene;
mod solve;
mod tools;
