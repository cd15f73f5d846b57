//! Opening the desk's window: with OpenGL where it works, else painted in software.

use std::cell::{Cell, RefCell};
use std::path::PathBuf;
use std::rc::Rc;

use eframe::UserEvent;
use egui::ViewportBuilder;
use winit::event_loop::EventLoop;
use winit::platform::run_on_demand::EventLoopExtRunOnDemand as _;

use super::paint::window;
use super::{Desk, theme};

/// Who paints the window.
#[derive(Clone, Copy, Debug, PartialEq, Eq, Default)]
pub enum Paint {
    /// OpenGL, or software where that fails.
    #[default]
    Auto,
    /// OpenGL alone.
    Gl,
    /// Software alone.
    Software,
}

/// Why no window opened. Its text says what to do.
#[derive(Clone, Debug, PartialEq, Eq, thiserror::Error)]
pub enum RunFault {
    /// There is no display to open a window on.
    #[error(
        "there is no display to open a window on; run this on a desktop, or use `conewright draw`, `ledger` \
         or `audit`, which need none"
    )]
    NoDisplay,
    /// OpenGL was asked for and does not work.
    #[error("OpenGL does not work here ({0}); leave out `--paint gl`, or use `--paint software`")]
    NoGl(String),
    /// The software window failed.
    #[error("the window could not be painted ({0}); try `--paint gl`")]
    NoPaint(String),
}

/// Opens the desk on a scene, or on nothing, and returns when it is closed. A scene that does not open is said in
/// the window.
///
/// # Errors
/// When no window can be opened; see [`RunFault`].
pub fn run(scene: Option<PathBuf>, paint: Paint) -> Result<(), RunFault> {
    let mut event_loop = EventLoop::<UserEvent>::with_user_event()
        .build()
        .map_err(|_no_display| RunFault::NoDisplay)?;
    // The desk is handed over only once a window stands, so that a failed attempt leaves it to the next.
    let desk = Rc::new(RefCell::new(Some(Desk::new(scene))));
    if paint != Paint::Software {
        match with_gl(&mut event_loop, &desk) {
            Ok(()) => return Ok(()),
            Err(fault) if paint == Paint::Gl => return Err(RunFault::NoGl(fault)),
            Err(_) => {}
        }
    }
    let Some(mut desk) = desk.take() else {
        return Ok(());
    };
    let ctx = egui::Context::default();
    theme::install(&ctx);
    window::run(&mut event_loop, viewport(), ctx, |ui| desk.ui(ui)).map_err(RunFault::NoPaint)
}

fn viewport() -> ViewportBuilder {
    ViewportBuilder::default()
        .with_title("Conewright")
        .with_app_id("conewright")
        .with_inner_size(theme::WINDOW)
        .with_min_inner_size(theme::WINDOW_MIN)
}

/// Runs in an OpenGL window. An error means that it never stood, and that `desk` is still there.
fn with_gl(
    event_loop: &mut EventLoop<UserEvent>,
    desk: &Rc<RefCell<Option<Desk>>>,
) -> Result<(), String> {
    let options = eframe::NativeOptions {
        viewport: viewport(),
        persist_window: false,
        system_font_fallback: false,
        dithering: false,
        ..Default::default()
    };
    let stood = Rc::new(Cell::new(false));
    let (standing, handed) = (Rc::clone(&stood), Rc::clone(desk));
    let creator: eframe::AppCreator<'_> = Box::new(move |creation| {
        let desk = handed.take().ok_or("the desk is already open")?;
        standing.set(true);
        theme::install(&creation.egui_ctx);
        Ok(Box::new(Glow(desk)))
    });
    let ran = {
        let mut app = eframe::create_native("conewright", options, creator, event_loop);
        event_loop.run_app_on_demand(&mut app)
    };
    ran.map_err(|fault| fault.to_string())?;
    if stood.get() {
        Ok(())
    } else {
        Err("no window could be made with it".to_owned())
    }
}

struct Glow(Desk);

impl eframe::App for Glow {
    fn ui(&mut self, ui: &mut egui::Ui, _: &mut eframe::Frame) {
        self.0.ui(ui);
    }
}
