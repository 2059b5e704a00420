//! The figure of the reduced pressure-temperature plane: where the rules of thumb allow the ideal gas law, and the states.

use std::fmt::Write;

use crate::report::formula::escape;
use crate::report::typeset::raised;
use crate::solve::Verdict;
use crate::units::math;

/// A figure of one gas.
#[derive(Clone, Debug, PartialEq)]
pub(in crate::report) struct Plane {
    /// What the gas is.
    pub(in crate::report) gas: String,
    /// Its states.
    pub(in crate::report) points: Vec<Point>,
    /// Along which the error of the ideal law first reaches the limit: reduced pressure and temperature, temperature rising. Empty
    /// where nothing tells it.
    pub(in crate::report) line: Vec<(f64, f64)>,
    /// The limit with its sign of percent.
    pub(in crate::report) limit: String,
}

/// A state in the reduced plane.
#[derive(Clone, Debug, PartialEq)]
pub(in crate::report) struct Point {
    /// Its name.
    pub(in crate::report) name: String,
    /// Pressure over critical pressure, above zero.
    pub(in crate::report) p_r: f64,
    /// Temperature over critical temperature, above zero.
    pub(in crate::report) t_r: f64,
    /// The verdict on the ideal law, which its mark shows.
    pub(in crate::report) verdict: Verdict,
}

// The drawing in units of which a column of a phone shows about as many as it has pixels, so that its text keeps its size.
const WIDTH: f64 = 310.0;
const HEIGHT: f64 = 204.0;
const LEFT: f64 = 38.0;
const RIGHT: f64 = 300.0;
const TOP: f64 = 8.0;
const BOTTOM: f64 = 164.0;
/// Size of the text.
const TEXT: f64 = 12.0;
/// Radius of the mark of a state.
const RADIUS: f64 = 4.0;
/// Width of a character of the text, estimated on the large side.
const CHARACTER: f64 = 6.4;

/// Reduced pressure below which rule a holds, and reduced temperature above which it does.
const RULE_A: (f64, f64) = (1.0 / 3.0, 2.0);
/// Reduced pressure below which rule b holds.
const RULE_B: f64 = 0.01;

/// Steps of temperature from which on the line of the limit has a gap.
const GAP_IN_TEMPERATURE: f64 = 1.5;

/// Ratio of neighbouring pressures from which on it has one.
const GAP_IN_PRESSURE: f64 = 1.6;

/// The axes: where a reduced pressure and a reduced temperature stand.
struct Axes {
    p_low: f64,
    p_high: f64,
    t_low: f64,
    t_high: f64,
    /// Whether the axis of temperature is logarithmic, as hydrogen and helium need.
    t_logarithmic: bool,
}

impl Axes {
    fn of(points: &[Point]) -> Self {
        let extreme = |start: f64, pick: fn(f64, f64) -> f64, of: fn(&Point) -> f64| points.iter().map(of).fold(start, pick);
        let decade = |value: f64, up: bool| {
            let exponent = math::log10(value);
            math::powi(10.0, if up { exponent.ceil() } else { exponent.floor() } as i32)
        };
        let p_low = decade(extreme(0.001, f64::min, |point| point.p_r * 0.8), false);
        let p_high = decade(extreme(10.0, f64::max, |point| point.p_r * 1.25), true);
        let t_low = extreme(0.5, f64::min, |point| point.t_r * 0.9);
        let t_high = extreme(4.0, f64::max, |point| point.t_r * 1.1);
        if t_high > 12.0 {
            return Self { p_low, p_high, t_low: decade(t_low, false).min(0.5), t_high: decade(t_high, true), t_logarithmic: true };
        }
        Self { p_low, p_high, t_low: (t_low * 2.0).floor() / 2.0, t_high: t_high.ceil(), t_logarithmic: false }
    }

    /// Whether a reduced pressure and temperature lie within the axes.
    fn shows(&self, (p_r, t_r): (f64, f64)) -> bool {
        (self.p_low..=self.p_high).contains(&p_r) && (self.t_low..=self.t_high).contains(&t_r)
    }

    fn x(&self, p_r: f64) -> f64 {
        let (low, high) = (math::ln(self.p_low), math::ln(self.p_high));
        let share = (math::ln(p_r) - low) / (high - low);
        LEFT + share.clamp(0.0, 1.0) * (RIGHT - LEFT)
    }

    fn y(&self, t_r: f64) -> f64 {
        let scale = |t: f64| if self.t_logarithmic { math::ln(t) } else { t };
        let share = (scale(t_r) - scale(self.t_low)) / (scale(self.t_high) - scale(self.t_low));
        BOTTOM - share.clamp(0.0, 1.0) * (BOTTOM - TOP)
    }

    /// Values with a tick and what stands beside it; empty where only the tick does.
    fn p_ticks(&self) -> Vec<(f64, String)> {
        let mut ticks = Vec::new();
        let decades = (math::log10(self.p_high / self.p_low)).round() as i32;
        let low = math::log10(self.p_low).round() as i32;
        for step in 0..=decades {
            let value = math::powi(10.0, low + step);
            // Of many decades only every second gets a number.
            let label = if decades <= 6 || step % 2 == 0 { decimal(low + step) } else { String::new() };
            ticks.push((value, label));
        }
        ticks.push((RULE_A.0, "1/3".to_owned()));
        ticks
    }

    fn t_ticks(&self) -> Vec<(f64, String)> {
        if self.t_logarithmic {
            let steps = [0.1, 0.2, 0.5, 1.0, 2.0, 5.0, 10.0, 20.0, 50.0, 100.0, 200.0, 500.0, 1000.0];
            return steps.iter().filter(|t| **t >= self.t_low && **t <= self.t_high).map(|t| (*t, format!("{t}"))).collect();
        }
        let step = if self.t_high - self.t_low > 5.0 { 1.0 } else { 0.5 };
        let first = (self.t_low / step).ceil() as i32;
        let last = (self.t_high / step).floor() as i32;
        (first..=last).map(|at| f64::from(at) * step).map(|t| (t, format!("{t}"))).collect()
    }
}

/// A power of ten as a decimal number: `0.01`, `1`, `100`; far ones as `10⁻⁵`.
fn decimal(exponent: i32) -> String {
    match exponent {
        -3..0 => format!("0.{}1", "0".repeat(exponent.unsigned_abs() as usize - 1)),
        0..=3 => format!("1{}", "0".repeat(exponent as usize)),
        _ => format!("10{}", raised(&exponent.to_string())),
    }
}

impl Plane {
    /// The figure as SVG. `number` tells the figures of a report apart.
    pub(in crate::report) fn svg(&self, number: usize) -> String {
        let axes = Axes::of(&self.points);
        let mut out = String::new();
        let _ = write!(
            out,
            r#"<svg class="plane" viewBox="0 0 {WIDTH} {HEIGHT}" role="img" aria-labelledby="plane-{number}"><title id="plane-{number}">"#
        );
        out.push_str("Reduced plane of ");
        escape(&self.gas, &mut out);
        out.push_str(": where rules of thumb allow the ideal gas law, and the states of this sheet</title>");
        push_zones(&axes, number, &mut out);
        let runs = self.runs(&axes);
        push_runs(&runs, &mut out);
        push_axes(&axes, &mut out);
        self.push_points(&axes, &runs, &mut out);
        out.push_str("</svg>");
        out
    }

    /// The line of the limit on the drawing: runs of points without a gap, within the axes.
    ///
    /// A gap is where temperatures are missing, or where the pressure jumps: near the Boyle temperature the error falls, turns and
    /// rises, and which of its sides reaches the limit first changes at once.
    fn runs(&self, axes: &Axes) -> Vec<Vec<(f64, f64)>> {
        let steps = self.line.windows(2).map(|pair| math::ln(pair[1].1 / pair[0].1));
        let step = steps.fold(f64::INFINITY, f64::min);
        let mut runs: Vec<Vec<(f64, f64)>> = Vec::new();
        let mut last: Option<(f64, f64)> = None;
        for point in &self.line {
            let inside = axes.shows(*point);
            let follows = last.is_some_and(|(p_r, t_r)| {
                math::ln(point.1 / t_r) < GAP_IN_TEMPERATURE * step && math::ln(point.0 / p_r).abs() < math::ln(GAP_IN_PRESSURE)
            });
            if inside {
                let place = (axes.x(point.0), axes.y(point.1));
                match runs.last_mut().filter(|_| follows) {
                    Some(run) => run.push(place),
                    None => runs.push(vec![place]),
                }
            }
            last = inside.then_some(*point);
        }
        runs.retain(|run| run.len() > 1);
        runs
    }

    /// Where the label of the line stands: beside it, free of what is there already.
    fn line_label(&self, runs: &[Vec<(f64, f64)>], taken: &[Area]) -> Option<Area> {
        let width = CHARACTER * self.limit.chars().count() as f64;
        let height = TEXT + 1.0;
        let longest = runs.iter().max_by(|a, b| span(a).total_cmp(&span(b)))?;
        let beside = |(x, y): (f64, f64), right: bool| {
            let left = if right { x + 3.0 } else { x - 3.0 - width };
            Area { left, right: left + width, top: y - height / 2.0, bottom: y + height / 2.0 }
        };
        // From the middle of the line outwards, so that the label stands well within the drawing.
        let middle = longest.len() / 2;
        let mut order: Vec<usize> = (0..longest.len()).collect();
        order.sort_by_key(|at| at.abs_diff(middle));
        let on_the_line = |area: &Area| longest.iter().any(|(x, y)| area.left < *x && *x < area.right && area.top < *y && *y < area.bottom);
        let free = |area: &Area| area.is_inside() && !on_the_line(area) && !taken.iter().any(|other| other.covers(area));
        order.into_iter().flat_map(|at| [beside(longest[at], true), beside(longest[at], false)]).find(free)
    }

    /// The marks of the states and their names, placed so that none covers another.
    fn push_points(&self, axes: &Axes, runs: &[Vec<(f64, f64)>], out: &mut String) {
        let places: Vec<(f64, f64)> = self.points.iter().map(|point| (axes.x(point.p_r), axes.y(point.t_r))).collect();
        let mut taken: Vec<Area> = places
            .iter()
            .map(|(x, y)| Area { left: x - RADIUS - 1.0, right: x + RADIUS + 1.0, top: y - RADIUS - 1.0, bottom: y + RADIUS + 1.0 })
            .collect();
        let label =
            |(x, y, _): (f64, f64, &str)| Area { left: x - 3.0 * CHARACTER, right: x + 3.0 * CHARACTER, top: y - TEXT, bottom: y + 3.0 };
        taken.extend(zone_labels(axes).map(label));
        let mut names = String::new();
        if let Some(area) = self.line_label(runs, &taken) {
            let _ = write!(names, r#"<text class="halo" x="{:.1}" y="{:.1}">"#, area.left, area.bottom - 3.5);
            escape(&self.limit, &mut names);
            names.push_str("</text>");
            taken.push(area);
        }
        for (label, at) in merged(&self.points, &places) {
            let (x, y) = places[at];
            let (area, far) = Area::beside(x, y, CHARACTER * label.chars().count() as f64, &taken);
            if far {
                let (to_x, to_y) = (x.clamp(area.left, area.right), y.clamp(area.top, area.bottom));
                let _ = write!(out, r##"<line x1="{x:.1}" y1="{y:.1}" x2="{to_x:.1}" y2="{to_y:.1}" stroke="#000" stroke-width=".6"/>"##);
            }
            let (text_x, anchor) = if area.right < x {
                (area.right, "end")
            } else if area.left > x {
                (area.left, "start")
            } else {
                ((area.left + area.right) / 2.0, "middle")
            };
            let _ = write!(names, r#"<text class="halo name" x="{text_x:.1}" y="{:.1}" text-anchor="{anchor}">"#, area.bottom - 3.5);
            escape(&label, &mut names);
            names.push_str("</text>");
            taken.push(area);
        }
        for ((x, y), point) in places.iter().zip(&self.points) {
            push_mark(*x, *y, point.verdict, out);
        }
        out.push_str(&names);
    }
}

/// The mark of a state: its shape and its filling tell the verdict, with no colour.
fn push_mark(x: f64, y: f64, verdict: Verdict, out: &mut String) {
    let _ = match verdict {
        Verdict::Confirmed => {
            write!(out, r##"<circle cx="{x:.1}" cy="{y:.1}" r="{RADIUS}" fill="#fff" stroke="#000" stroke-width="1.6"/>"##)
        }
        Verdict::Failed => {
            let r = RADIUS + 1.2;
            let corners = [(x, y - r), (x + r, y), (x, y + r), (x - r, y)].map(|(x, y)| format!("{x:.1},{y:.1}")).join(" ");
            write!(out, r##"<polygon points="{corners}" fill="#000" stroke="#fff" stroke-width=".8"/>"##)
        }
        Verdict::ForJudgement => {
            let (left, top, side) = (x - RADIUS + 0.5, y - RADIUS + 0.5, 2.0 * RADIUS - 1.0);
            write!(
                out,
                r##"<rect x="{left:.1}" y="{top:.1}" width="{side:.1}" height="{side:.1}" fill="#fff" stroke="#000" stroke-width="1.6"/>"##
            )
        }
    };
}

fn push_runs(runs: &[Vec<(f64, f64)>], out: &mut String) {
    for run in runs {
        let places: Vec<String> = run.iter().map(|(x, y)| format!("{x:.1},{y:.1}")).collect();
        let places = places.join(" ");
        // White below black keeps the line apart from the hatching.
        let _ = write!(out, r##"<polyline points="{places}" fill="none" stroke="#fff" stroke-width="4.5"/>"##);
        let _ = write!(out, r##"<polyline points="{places}" fill="none" stroke="#000" stroke-width="1.8"/>"##);
    }
}

/// How far a run reaches on the drawing.
fn span(run: &[(f64, f64)]) -> f64 {
    run.windows(2).map(|pair| (pair[1].0 - pair[0].0).abs() + (pair[1].1 - pair[0].1).abs()).sum()
}

/// The names to be written and the point beside which each stands: states whose marks cover each other share one.
fn merged(points: &[Point], places: &[(f64, f64)]) -> Vec<(String, usize)> {
    let mut labels: Vec<(String, usize)> = Vec::new();
    for (at, (x, y)) in places.iter().enumerate() {
        let near = labels.iter_mut().find(|(_, other)| (places[*other].0 - x).abs() < RADIUS && (places[*other].1 - y).abs() < RADIUS);
        match near {
            Some((label, _)) => {
                label.push_str(", ");
                label.push_str(&points[at].name);
            }
            None => labels.push((points[at].name.clone(), at)),
        }
    }
    labels
}

/// A rectangle of the drawing.
#[derive(Clone, Copy, Debug)]
struct Area {
    left: f64,
    right: f64,
    top: f64,
    bottom: f64,
}

impl Area {
    fn covers(&self, other: &Self) -> bool {
        self.left < other.right && other.left < self.right && self.top < other.bottom && other.top < self.bottom
    }

    fn is_inside(&self) -> bool {
        self.left >= LEFT + 1.0 && self.right <= RIGHT - 1.0 && self.top >= TOP + 1.0 && self.bottom <= BOTTOM - 1.0
    }

    /// The first free place for a text beside a mark, and whether it is so far off that a line has to lead to it.
    fn beside(x: f64, y: f64, width: f64, taken: &[Self]) -> (Self, bool) {
        let height = TEXT + 1.0;
        let gap = RADIUS + 3.0;
        let place = |left: f64, middle: f64| Self { left, right: left + width, top: middle - height / 2.0, bottom: middle + height / 2.0 };
        let near = [
            place(x + gap, y),
            place(x - gap - width, y),
            place(x - width / 2.0, y - gap - height / 2.0),
            place(x - width / 2.0, y + gap + height / 2.0),
            place(x + gap, y - height / 2.0),
            place(x + gap, y + height / 2.0),
            place(x - gap - width, y - height / 2.0),
            place(x - gap - width, y + height / 2.0),
        ];
        let free = |area: &Self| area.is_inside() && !taken.iter().any(|other| other.covers(area));
        if let Some(area) = near.into_iter().find(free) {
            return (area, false);
        }
        // Further off, in rings around the mark.
        for ring in 1..=12 {
            let off = height * f64::from(ring);
            for (aside, down) in
                [(gap, off), (gap, -off), (-gap - width, off), (-gap - width, -off), (gap + off, 0.0), (-gap - width - off, 0.0)]
            {
                let area = place(x + aside, y + down);
                if free(&area) {
                    return (area, true);
                }
            }
        }
        (near[0], false)
    }
}

fn push_zones(axes: &Axes, number: usize, out: &mut String) {
    let _ = write!(
        out,
        concat!(
            r##"<defs><pattern id="rule-a-{0}" width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(45)">"##,
            r##"<line x1="0" y1="0" x2="0" y2="7" stroke="#000" stroke-width=".5"/></pattern>"##,
            r##"<pattern id="rule-b-{0}" width="7" height="7" patternUnits="userSpaceOnUse" patternTransform="rotate(-45)">"##,
            r##"<line x1="0" y1="0" x2="0" y2="7" stroke="#000" stroke-width=".6" stroke-dasharray="2 2"/></pattern></defs>"##
        ),
        number
    );
    let mut zone = |rule: &str, right: f64, bottom: f64| {
        if right > LEFT && bottom > TOP {
            let (width, height) = (right - LEFT, bottom - TOP);
            let _ =
                write!(out, r#"<rect x="{LEFT}" y="{TOP}" width="{width:.1}" height="{height:.1}" fill="url(#rule-{rule}-{number})"/>"#);
        }
    };
    zone("a", axes.x(RULE_A.0), axes.y(RULE_A.1));
    zone("b", axes.x(RULE_B), BOTTOM);
    for (x, y, label) in zone_labels(axes) {
        let _ = write!(out, r#"<text class="halo" x="{x:.1}" y="{y:.1}" text-anchor="middle">{label}</text>"#);
    }
}

/// Where the names of the zones stand.
fn zone_labels(axes: &Axes) -> [(f64, f64, &'static str); 2] {
    [((axes.x(RULE_B) + axes.x(RULE_A.0)) / 2.0, TOP + TEXT + 4.0, "rule a"), ((LEFT + axes.x(RULE_B)) / 2.0, BOTTOM - 8.0, "rule b")]
}

fn push_axes(axes: &Axes, out: &mut String) {
    let _ = write!(
        out,
        r##"<rect x="{LEFT}" y="{TOP}" width="{}" height="{}" fill="none" stroke="#000" stroke-width=".8"/>"##,
        RIGHT - LEFT,
        BOTTOM - TOP
    );
    for (p_r, label) in axes.p_ticks() {
        let x = axes.x(p_r);
        let _ = write!(out, r##"<line x1="{x:.1}" x2="{x:.1}" y1="{BOTTOM}" y2="{:.1}" stroke="#000" stroke-width=".8"/>"##, BOTTOM + 4.0);
        let _ = write!(out, r#"<text x="{x:.1}" y="{:.1}" text-anchor="middle">{label}</text>"#, BOTTOM + 17.0);
    }
    for (t_r, label) in axes.t_ticks() {
        let y = axes.y(t_r);
        let _ = write!(out, r##"<line x1="{:.1}" x2="{LEFT}" y1="{y:.1}" y2="{y:.1}" stroke="#000" stroke-width=".8"/>"##, LEFT - 4.0);
        let _ = write!(out, r#"<text x="{:.1}" y="{:.1}" text-anchor="end">{label}</text>"#, LEFT - 7.0, y + 4.0);
    }
    let lowered = r#"<tspan dy="3" font-size="9">c</tspan>"#;
    let (middle, below) = ((LEFT + RIGHT) / 2.0, HEIGHT - 6.0);
    let _ = write!(
        out,
        r#"<text x="{middle}" y="{below}" text-anchor="middle">reduced pressure, <tspan class="name">p</tspan> / <tspan class="name">p</tspan>{lowered}</text>"#
    );
    let middle = (TOP + BOTTOM) / 2.0;
    let _ = write!(
        out,
        r#"<text transform="translate(11 {middle}) rotate(-90)" text-anchor="middle">reduced temperature, <tspan class="name">T</tspan> / <tspan class="name">T</tspan>{lowered}</text>"#
    );
}

#[cfg(test)]
mod tests {
    use super::*;

    fn point(name: &str, p_r: f64, t_r: f64) -> Point {
        Point { name: name.into(), p_r, t_r, verdict: Verdict::Confirmed }
    }

    #[test]
    fn names_of_crowded_states_do_not_cover_each_other() {
        let points: Vec<Point> =
            (0..9).map(|at| point(&format!("state_{at}"), 0.2 * (1.0 + 0.06 * f64::from(at)), 2.2 + 0.02 * f64::from(at))).collect();
        let axes = Axes::of(&points);
        let mut taken: Vec<Area> = Vec::new();
        for point in &points {
            let (area, _) = Area::beside(axes.x(point.p_r), axes.y(point.t_r), CHARACTER * 7.0, &taken);
            assert!(area.is_inside() && !taken.iter().any(|other| other.covers(&area)));
            taken.push(area);
        }
    }

    #[test]
    fn states_at_one_place_share_a_name_and_markup_is_text() {
        let svg = Plane {
            gas: "a < b".into(),
            points: vec![point("full", 0.3, 2.4), point("again", 0.3, 2.4)],
            line: Vec::new(),
            limit: String::new(),
        }
        .svg(1);
        assert!(svg.contains(">full, again</text>") && svg.contains("a &lt; b"), "{svg}");
    }

    #[test]
    fn the_line_of_the_limit_has_a_label_and_breaks_where_it_jumps() {
        let rising = (0..20).map(|at| (0.02 + 0.005 * f64::from(at), 0.8 * math::powi(1.05, at)));
        let beyond = (20..30).map(|at| (2.0 + 0.1 * f64::from(at), 0.8 * math::powi(1.05, at)));
        let plane = Plane {
            gas: "n2".into(),
            points: vec![point("full", 0.3, 2.4)],
            line: rising.chain(beyond).collect(),
            limit: "1\u{a0}%".into(),
        };
        let runs = plane.runs(&Axes::of(&plane.points));
        assert_eq!(runs.iter().map(Vec::len).collect::<Vec<_>>(), [20, 10]);
        assert!(plane.svg(1).contains(">1\u{a0}%</text>"));
    }

    #[test]
    fn the_mark_of_a_state_tells_its_verdict_without_colour() {
        let mark = |verdict| {
            let mut out = String::new();
            push_mark(10.0, 10.0, verdict, &mut out);
            out
        };
        let marks = [Verdict::Confirmed, Verdict::Failed, Verdict::ForJudgement].map(mark);
        assert!(marks[0].starts_with("<circle") && marks[1].starts_with("<polygon") && marks[2].starts_with("<rect"));
    }

    #[test]
    fn helium_at_room_temperature_gets_a_logarithmic_axis() {
        let axes = Axes::of(&[point("he", 1e-5, 57.0)]);
        assert!(axes.t_logarithmic && axes.t_high == 100.0 && axes.p_low < 1e-5);
        let plane = Axes::of(&[point("n2", 0.3, 2.4)]);
        assert!(!plane.t_logarithmic && plane.t_low == 0.5 && plane.t_high == 4.0 && plane.p_low == 0.001);
        assert!((plane.y(2.0) - (BOTTOM - (BOTTOM - TOP) * 1.5 / 3.5)).abs() < 1e-9 && plane.x(10.0) == RIGHT);
    }
}
