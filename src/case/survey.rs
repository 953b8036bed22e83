//! Survey points from a CSV file: number, east, north, code.

use super::model::{Entry, Point};
use crate::diag::{FileId, Notice, Notices, Place};
use crate::stats::Dist;
use crate::units::Kind;

const EXPECTED: &str =
    "a header row: number,east,north,code (coordinates in the unit that [survey] names, else metres)";

/// A points file being read.
struct File<'a> {
    /// Its text, without a byte-order mark.
    text: &'a str,
    /// Bytes of the mark: places count it.
    skip: usize,
    id: FileId,
    /// Uncertainty of each coordinate, round zero.
    spread: Dist,
    /// Name of its unit and the unit's length in metres.
    unit: (&'static str, f64),
}

/// Reads all points; `spread` is the uncertainty of each coordinate, round
/// zero, and `unit` the file's unit with its length in metres. Faults are
/// reported with their place in the CSV file.
pub(super) fn points(
    text: &str,
    id: FileId,
    spread: Dist,
    unit: (&'static str, f64),
    notices: &mut Notices,
) -> Vec<Point> {
    let bare = text.trim_start_matches('\u{feff}');
    let file = File { text: bare, skip: text.len() - bare.len(), id, spread, unit };
    let mut reader =
        csv::ReaderBuilder::new().trim(csv::Trim::All).flexible(true).from_reader(bare.as_bytes());
    let Some(columns) = columns(&mut reader, &file, notices) else { return Vec::new() };
    let mut points: Vec<Point> = Vec::new();
    for record in reader.records() {
        let Ok(record) = record else {
            notices.push(
                Notice::stop("CF-9", "a row of the points file cannot be read").at(header_place(&file)),
            );
            continue;
        };
        match point(&file, columns, &record) {
            Ok(new) if points.iter().any(|p| p.number == new.number) => {
                let message = format!("point {} stands twice", new.number);
                let notice = Notice::stop("CF-9", message).at(new.east.place);
                notices.push(notice.expected("each point once, with its number"));
            }
            Ok(new) => points.push(new),
            Err(notice) => notices.push(*notice),
        }
    }
    points
}

/// Which column holds what.
type Columns = ([usize; 3], Option<usize>);

fn columns(reader: &mut csv::Reader<&[u8]>, file: &File<'_>, notices: &mut Notices) -> Option<Columns> {
    let header = reader.headers().cloned().unwrap_or_default();
    let at = |name: &str| header.iter().position(|h| h == name);
    if let (Some(number), Some(east), Some(north)) = (at("number"), at("east"), at("north")) {
        return Some(([number, east, north], at("code")));
    }
    let first = file.text.lines().next().unwrap_or_default();
    let message = if first.contains([';', '\t']) && !first.contains(',') {
        "the columns of the points file are not separated by commas"
    } else {
        "the points file lacks a column: number, east or north"
    };
    notices.push(Notice::stop("CF-9", message).at(header_place(file)).expected(EXPECTED));
    None
}

fn header_place(file: &File<'_>) -> Place {
    let end = file.text.lines().next().map_or(0, str::len);
    Place { file: file.id, start: file.skip, end: file.skip + end }
}

fn point(
    file: &File<'_>,
    ([number, east, north], code): Columns,
    record: &csv::StringRecord,
) -> Result<Point, Box<Notice>> {
    let place = row_place(file, record);
    let id = record.get(number).unwrap_or_default();
    if id.is_empty() {
        let notice = Notice::stop("CF-9", "a point without a number").at(place);
        return Err(Box::new(notice.expected("each point once, with its number")));
    }
    let code = code.and_then(|c| record.get(c)).filter(|c| !c.is_empty());
    let said = code.map_or(String::new(), |c| format!(" ({c})"));
    let coordinate = |column: usize, axis: &str| {
        let typed = record.get(column).unwrap_or_default();
        let value = typed.parse::<f64>().ok().filter(|v| v.is_finite())? * file.unit.1;
        Some(Entry {
            name: format!("point {id}{said}, {axis}"),
            kind: Kind::Length,
            dist: file.spread.affine(value, 1.0),
            entered: format!("{typed} {}", file.unit.0),
            source: Some("survey".into()),
            note: None,
            place,
            bounds: (f64::NEG_INFINITY, f64::INFINITY),
        })
    };
    match (coordinate(east, "east"), coordinate(north, "north")) {
        (Some(east), Some(north)) => Ok(Point { number: id.into(), east, north }),
        _ => {
            let notice = Notice::stop("CF-9", format!("point {id}: a coordinate is not a number")).at(place);
            Err(Box::new(notice.expected("a number with a decimal point")))
        }
    }
}

/// The bytes of a record's row.
fn row_place(file: &File<'_>, record: &csv::StringRecord) -> Place {
    let (text, skip, file) = (file.text, file.skip, file.id);
    let start = record.position().map_or(0, |p| usize::try_from(p.byte()).unwrap_or(0)).min(text.len());
    let rest = text.get(start..).unwrap_or_default();
    let blank = rest.len() - rest.trim_start_matches(['\r', '\n']).len();
    let length = rest[blank..].find(['\r', '\n']).unwrap_or(rest.len() - blank);
    Place { file, start: skip + start + blank, end: skip + start + blank + length }
}
