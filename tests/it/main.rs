//! Behaviour through public doors.
#![cfg(test)]

mod cli;
mod core;
#[cfg(feature = "window")]
mod desk;
mod export;
mod facts;
mod hostile;
mod house;
mod label;
mod outside;
mod plate;
mod quantity;
mod scene;
mod solve;
