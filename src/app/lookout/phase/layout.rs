//! Where everything of the phase card goes.

use super::model::{Model, Seen, Through};
use crate::app::command::OpticsView;
use crate::app::lookout::says::Says;
use crate::app::scene::Scene;
use crate::sky::Body;
use crate::words::decimal;
use eframe::egui::text::{LayoutJob, TextWrapping};
use eframe::egui::{Align2, Color32, Galley, Painter, Pos2, Rect, pos2};
use std::sync::Arc;

/// Where things go, in points of the screen.
pub struct Layout {
    /// The whole card.
    pub card: Rect,
    /// The title, and what the rings are as large as.
    pub texts: [(Pos2, Arc<Galley>); 2],
    /// The radius of the ring around every disc.
    pub ring: f32,
    /// To the eye, in a binocular, in the telescope.
    pub discs: [Disc; 3],
}

/// One disc with what stands under it.
pub struct Disc {
    /// Its third of the card.
    pub place: Rect,
    /// Its middle.
    pub centre: Pos2,
    /// The captions, as words.
    pub captions: (String, String),
    /// The captions, placed.
    pub texts: [(Pos2, Arc<Galley>); 2],
}

impl Layout {
    /// Lays the card out.
    pub fn new(painter: &Painter, scene: &Scene<'_>, model: &Model, card: Rect) -> Self {
        let (look, says) = (&scene.look, Says::new(scene));
        let inner = card.shrink(look.room.inside);
        let font = look.font(look.sizes.label);
        let line = |text: String, colour: Color32, width: f32| {
            let mut job = LayoutJob::simple_singleline(text, font.clone(), colour);
            job.wrap = TextWrapping::truncate_at_width(width);
            painter.layout_job(job)
        };
        let lesser = look.colours.lesser;
        let size = match model.body {
            Body::Moon | Body::Sun => says.text(
                "phase-arcminutes",
                &[("size", &decimal(model.ring.arcsec() / 60.0, 0))],
            ),
            _ => says.text(
                "phase-arcseconds",
                &[("size", &decimal(model.ring.arcsec(), 0))],
            ),
        };
        let scale = says.text("phase-scale", &[("size", &size)]);
        let scale = line(scale, lesser, 0.4 * inner.width());
        let left = inner.width() - scale.size().x - 8.0;
        let title = line(says.text("phase-title", &[]), lesser, left);
        let row = title.size().y;
        let width = inner.width() / 3.0;
        let captions = 2.0 * row + 6.0;
        let ring = (0.5 * width - 7.0)
            .min(0.5 * (inner.height() - row - captions - 8.0))
            .max(8.0);
        let discs = [0, 1, 2].map(|k| {
            let captions = captions_of(says, model, &model.views[k]);
            let x = inner.left() + (k as f32 + 0.5) * width;
            let centre = pos2(x, inner.top() + row + 6.0 + ring);
            let name = line(captions.0.clone(), look.colours.text, width - 4.0);
            let note = line(captions.1.clone(), lesser, width - 4.0);
            let place =
                |text: &Galley, y: f32| Align2::CENTER_TOP.anchor_size(pos2(x, y), text.size()).min;
            let top = centre.y + ring + 4.0;
            let texts = [(place(&name, top), name), (place(&note, top + row), note)];
            Disc {
                place: Rect::from_min_max(
                    pos2(x - 0.5 * width, centre.y - ring - 3.0),
                    pos2(x + 0.5 * width, inner.bottom() + 6.0),
                ),
                centre,
                captions,
                texts,
            }
        });
        let scale_at = pos2(inner.right() - scale.size().x, inner.top());
        Self {
            card,
            texts: [(inner.min, title), (scale_at, scale)],
            ring,
            discs,
        }
    }
}

/// What each disc is called, and what is to be known of it.
fn captions_of(says: Says<'_>, model: &Model, seen: &Seen) -> (String, String) {
    let view = says.text(
        match seen.view {
            OpticsView::Erect => "phase-erect",
            OpticsView::Inverted => "phase-inverted",
            OpticsView::Mirrored => "phase-mirrored",
        },
        &[],
    );
    match &seen.through {
        Through::Eye => {
            let is_disc = matches!(model.body, Body::Moon | Body::Sun);
            let id = if is_disc {
                "phase-eye-disc"
            } else {
                "phase-eye-point"
            };
            (says.text("phase-eye", &[]), says.text(id, &[]))
        }
        Through::Binocular(label) => {
            let label = label.clone();
            (
                label.unwrap_or_else(|| says.text("phase-binocular", &[])),
                view,
            )
        }
        Through::Telescope(None) => (says.text("phase-telescope", &[]), view),
        Through::Telescope(Some((label, power))) => {
            let power = decimal(*power, 0);
            let note = says.text("phase-power", &[("power", &power), ("view", &view)]);
            (label.clone(), note)
        }
    }
}
