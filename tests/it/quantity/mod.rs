//! Tests of `quantity`.

mod expressions;
mod numbers;
mod particles;
mod text;
mod units;

use conewright::quantity::{Dimension, Number, Quantity, ReadFault, Typed, Unit, read};

fn read_in(text: &str, symbol: &str, dimension: Dimension) -> Result<Quantity, ReadFault> {
    let unit = Unit::named(symbol, dimension).expect("a unit");
    read(&Typed::Text(text.to_owned()), &unit)
}

fn plain(text: &str) -> Result<Quantity, ReadFault> {
    read_in(text, "", Dimension::Plain)
}

fn value(text: &str) -> Number {
    plain(text)
        .unwrap_or_else(|f| panic!("{text}: {f:?}"))
        .value
}

fn exact(text: &str) -> Number {
    Number::decimal(text).expect("a decimal")
}
