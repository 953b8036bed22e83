//! Survey points from a CSV file: number, east, north, code.

use super::model::{Entry, Point};
use crate::diag::{FileId, Notice, Notices, Place};
use crate::stats::Dist;
use crate::units::Kind;

const EXPECTED: &str = "a header row: number,east,north,code (coordinates in metres)";

/// Reads all points; `spread` is the uncertainty of each coordinate, round
/// zero. Faults are reported with their place in the CSV file.
pub(super) fn points(text: &str, file: FileId, spread: Dist, notices: &mut Notices) -> Vec<Point> {
    let mut reader =
        csv::ReaderBuilder::new().trim(csv::Trim::All).flexible(true).from_reader(text.as_bytes());
    let whole = Place { file, start: 0, end: text.lines().next().map_or(0, str::len) };
    let columns = match reader.headers() {
        Ok(header) => ["number", "east", "north", "code"].map(|name| header.iter().position(|h| h == name)),
        Err(error) => {
            notices.push(
                Notice::stop("CF-9", format!("the points file is not CSV: {error}"))
                    .at(whole)
                    .expected(EXPECTED),
            );
            return Vec::new();
        }
    };
    let [Some(number), Some(east), Some(north), code] = columns else {
        notices.push(Notice::stop("CF-9", "the points file lacks a column").at(whole).expected(EXPECTED));
        return Vec::new();
    };
    let mut points: Vec<Point> = Vec::new();
    for record in reader.records() {
        let record = match record {
            Ok(record) => record,
            Err(error) => {
                notices.push(
                    Notice::stop("CF-9", format!("a row of the points file cannot be read: {error}"))
                        .at(whole),
                );
                continue;
            }
        };
        let place = row_place(text, file, &record);
        let id = record.get(number).unwrap_or_default();
        if id.is_empty() || points.iter().any(|p| p.number == id) {
            let message = if id.is_empty() {
                "a point without a number".into()
            } else {
                format!("point {id} stands twice")
            };
            notices
                .push(Notice::stop("CF-9", message).at(place).expected("each point once, with its number"));
            continue;
        }
        let code = code.and_then(|c| record.get(c)).filter(|c| !c.is_empty());
        let coordinate = |column: usize, axis: &str| {
            let typed = record.get(column).unwrap_or_default();
            let value = typed.parse::<f64>().ok().filter(|v| v.is_finite())?;
            Some(entry(value, spread, id, code, axis, typed, place))
        };
        match (coordinate(east, "east"), coordinate(north, "north")) {
            (Some(east), Some(north)) => points.push(Point { number: id.into(), east, north }),
            _ => notices.push(
                Notice::stop("CF-9", format!("point {id}: a coordinate is not a number"))
                    .at(place)
                    .expected("metres with a decimal point"),
            ),
        }
    }
    points
}

fn entry(
    value: f64,
    spread: Dist,
    id: &str,
    code: Option<&str>,
    axis: &str,
    typed: &str,
    place: Place,
) -> Entry {
    Entry {
        name: format!("point {id}{}, {axis}", code.map_or(String::new(), |c| format!(" ({c})"))),
        kind: Kind::Length,
        dist: spread.affine(value, 1.0),
        entered: format!("{typed} m"),
        source: Some("survey".into()),
        note: None,
        place,
        bounds: (f64::NEG_INFINITY, f64::INFINITY),
    }
}

/// The bytes of a record's row.
fn row_place(text: &str, file: FileId, record: &csv::StringRecord) -> Place {
    let start = record.position().map_or(0, |p| usize::try_from(p.byte()).unwrap_or(0)).min(text.len());
    let rest = text.get(start..).unwrap_or_default();
    let blank = rest.len() - rest.trim_start_matches(['\r', '\n']).len();
    let length = rest[blank..].find(['\r', '\n']).unwrap_or(rest.len() - blank);
    Place { file, start: start + blank, end: start + blank + length }
}
