//! The desk: egui panels that show marks and rows and turn gestures into changes of view.
