//! A window painted in software, for machines whose OpenGL is missing or broken.

#![expect(
    clippy::cast_possible_truncation,
    reason = "the screen is in f32 points"
)]

use std::num::NonZeroU32;
use std::sync::Arc;
use std::time::Instant;

use eframe::UserEvent;
use egui::{ViewportBuilder, ViewportEvent, ViewportId, ViewportInfo};
use egui_winit::accesskit_winit::WindowEvent as AccessEvent;
use winit::application::ApplicationHandler;
use winit::event::WindowEvent;
use winit::event_loop::{ActiveEventLoop, ControlFlow, EventLoop, EventLoopProxy};
use winit::platform::run_on_demand::EventLoopExtRunOnDemand as _;
use winit::window::{Window, WindowId};

use super::{Picture, SoftPainter};

/// Runs `ui` in a window until it is closed.
///
/// # Errors
/// Words about why no window could be opened or painted.
pub(crate) fn run(
    event_loop: &mut EventLoop<UserEvent>,
    viewport: ViewportBuilder,
    ctx: egui::Context,
    ui: impl FnMut(&mut egui::Ui),
) -> Result<(), String> {
    let proxy = event_loop.create_proxy();
    let waker = std::sync::Mutex::new(proxy.clone());
    ctx.set_request_repaint_callback(move |info| {
        let Ok(proxy) = waker.lock() else { return };
        // A loop that is gone needs no repaint.
        let _gone = proxy.send_event(UserEvent::RequestRepaint {
            viewport_id: info.viewport_id,
            when: Instant::now() + info.delay,
            cumulative_pass_nr: info.current_cumulative_pass_nr,
        });
    });
    let mut runner = Runner {
        ctx,
        viewport,
        ui,
        proxy,
        shown: None,
        repaint_at: None,
        fault: None,
    };
    event_loop
        .run_app_on_demand(&mut runner)
        .map_err(|e| e.to_string())?;
    runner.fault.map_or(Ok(()), Err)
}

struct Runner<F> {
    ctx: egui::Context,
    viewport: ViewportBuilder,
    ui: F,
    proxy: EventLoopProxy<UserEvent>,
    shown: Option<Shown>,
    repaint_at: Option<Instant>,
    fault: Option<String>,
}

/// The window and what belongs to it.
struct Shown {
    window: Arc<Window>,
    surface: softbuffer::Surface<Arc<Window>, Arc<Window>>,
    input: egui_winit::State,
    info: ViewportInfo,
    painter: SoftPainter,
    picture: Picture,
}

/// Whether a frame is painted, or only heeds what was done.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
enum Showing {
    Painted,
    Unseen,
}

impl Shown {
    fn open(
        ctx: &egui::Context,
        event_loop: &ActiveEventLoop,
        viewport: &ViewportBuilder,
        proxy: EventLoopProxy<UserEvent>,
    ) -> Result<Self, String> {
        let hidden = viewport.clone().with_visible(false);
        let window = egui_winit::create_window(ctx, event_loop, &hidden)
            .map(Arc::new)
            .map_err(|e| e.to_string())?;
        let display = softbuffer::Context::new(Arc::clone(&window)).map_err(|e| e.to_string())?;
        let surface =
            softbuffer::Surface::new(&display, Arc::clone(&window)).map_err(|e| e.to_string())?;
        let scale = window.scale_factor() as f32;
        let mut input = egui_winit::State::new(
            ctx.clone(),
            ViewportId::ROOT,
            event_loop,
            Some(scale),
            window.theme(),
            None,
        );
        input.init_accesskit(event_loop, &window, proxy);
        let mut info = ViewportInfo::default();
        egui_winit::update_viewport_info(&mut info, ctx, &window, true);
        window.set_visible(true);
        Ok(Self {
            window,
            surface,
            input,
            info,
            painter: SoftPainter::default(),
            picture: Picture::default(),
        })
    }

    /// One frame. True once the window is to close.
    fn frame(
        &mut self,
        ctx: &egui::Context,
        event_loop: &ActiveEventLoop,
        ui: &mut impl FnMut(&mut egui::Ui),
        showing: Showing,
    ) -> Result<bool, String> {
        egui_winit::update_viewport_info(&mut self.info, ctx, &self.window, false);
        let closing = self.info.close_requested();
        let mut raw = self.input.take_egui_input(&self.window);
        raw.viewports.insert(ViewportId::ROOT, self.info.clone());
        self.info.events.clear();
        let mut output = ctx.run_ui(raw, ui);
        self.input.handle_platform_output_with_event_loop(
            &self.window,
            event_loop,
            output.platform_output,
        );
        let mut actions = Vec::new();
        for (_, viewport) in output.viewport_output {
            egui_winit::process_viewport_commands(
                ctx,
                &mut self.info,
                viewport.commands,
                &self.window,
                &mut actions,
            );
        }
        self.painter.set_textures(&mut output.textures_delta);
        let painted = match showing {
            Showing::Painted => {
                let primitives = ctx.tessellate(output.shapes, output.pixels_per_point);
                self.paint(&primitives, output.pixels_per_point)
            }
            Showing::Unseen => Ok(()),
        };
        self.painter.free_textures(&mut output.textures_delta);
        painted.map(|()| closing)
    }

    fn paint(
        &mut self,
        primitives: &[egui::ClippedPrimitive],
        pixels_per_point: f32,
    ) -> Result<(), String> {
        let size = self.window.inner_size();
        let (Some(width), Some(height)) =
            (NonZeroU32::new(size.width), NonZeroU32::new(size.height))
        else {
            return Ok(());
        };
        let (across, down) = (size.width as usize, size.height as usize);
        if self.picture.size() != (across, down) {
            self.picture = Picture::filled(across, down, [0, 0, 0, 255]);
            self.surface
                .resize(width, height)
                .map_err(|e| e.to_string())?;
        }
        self.painter
            .paint(&mut self.picture, primitives, pixels_per_point);
        let mut buffer = self.surface.buffer_mut().map_err(|e| e.to_string())?;
        for (target, [r, g, b, _]) in buffer.iter_mut().zip(self.picture.pixels()) {
            *target = u32::from_be_bytes([0, *r, *g, *b]);
        }
        self.window.pre_present_notify();
        buffer.present().map_err(|e| e.to_string())
    }
}

impl<F: FnMut(&mut egui::Ui)> Runner<F> {
    fn fail(&mut self, event_loop: &ActiveEventLoop, fault: String) {
        self.fault = Some(fault);
        event_loop.exit();
    }

    fn frame(&mut self, event_loop: &ActiveEventLoop, showing: Showing) {
        let Some(shown) = &mut self.shown else { return };
        self.repaint_at = None;
        match shown.frame(&self.ctx, event_loop, &mut self.ui, showing) {
            Ok(false) => {}
            Ok(true) => event_loop.exit(),
            Err(fault) => self.fail(event_loop, fault),
        }
    }

    fn access(&mut self, event: AccessEvent) {
        let Some(shown) = &mut self.shown else { return };
        match event {
            AccessEvent::InitialTreeRequested => self.ctx.enable_accesskit(),
            AccessEvent::ActionRequested(request) => {
                shown.input.on_accesskit_action_request(request);
            }
            AccessEvent::AccessibilityDeactivated => {
                self.ctx.disable_accesskit();
                return;
            }
        }
        shown.window.request_redraw();
    }
}

impl<F: FnMut(&mut egui::Ui)> ApplicationHandler<UserEvent> for Runner<F> {
    fn resumed(&mut self, event_loop: &ActiveEventLoop) {
        if self.shown.is_some() {
            return;
        }
        match Shown::open(&self.ctx, event_loop, &self.viewport, self.proxy.clone()) {
            Ok(shown) => {
                shown.window.request_redraw();
                self.shown = Some(shown);
            }
            Err(fault) => self.fail(event_loop, fault),
        }
    }

    fn window_event(&mut self, event_loop: &ActiveEventLoop, _: WindowId, event: WindowEvent) {
        if event == WindowEvent::RedrawRequested {
            self.frame(event_loop, Showing::Painted);
            return;
        }
        // A press and a release are each met by a frame of their own, so that a slow frame between them loses no drag.
        let is_button = matches!(event, WindowEvent::MouseInput { .. });
        if is_button {
            self.frame(event_loop, Showing::Unseen);
        }
        let Some(shown) = &mut self.shown else { return };
        if event == WindowEvent::CloseRequested {
            shown.info.events.push(ViewportEvent::Close);
            shown.window.request_redraw();
        }
        let response = shown.input.on_window_event(&shown.window, &event);
        if response.repaint {
            shown.window.request_redraw();
        }
        if is_button {
            self.frame(event_loop, Showing::Unseen);
        }
    }

    fn user_event(&mut self, _: &ActiveEventLoop, event: UserEvent) {
        match event {
            UserEvent::RequestRepaint {
                when,
                cumulative_pass_nr,
                ..
            } => {
                // A request made during a frame that has been painted since is served already.
                let pass = self.ctx.cumulative_pass_nr();
                if pass == cumulative_pass_nr || pass == cumulative_pass_nr + 1 {
                    self.repaint_at = Some(self.repaint_at.map_or(when, |at| at.min(when)));
                }
            }
            UserEvent::AccessKitActionRequest(event) => self.access(event.window_event),
        }
    }

    fn about_to_wait(&mut self, event_loop: &ActiveEventLoop) {
        let Some(at) = self.repaint_at else {
            event_loop.set_control_flow(ControlFlow::Wait);
            return;
        };
        if at <= Instant::now() {
            self.repaint_at = None;
            if let Some(shown) = &self.shown {
                shown.window.request_redraw();
            }
            event_loop.set_control_flow(ControlFlow::Wait);
        } else {
            event_loop.set_control_flow(ControlFlow::WaitUntil(at));
        }
    }
}
