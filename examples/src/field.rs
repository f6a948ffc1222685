//! The columns of a book, by name, in whatever order the header has them.

use std::fmt;

use crate::rows::Row;

/// A column that a book has.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(crate) enum Field {
    Id,
    Contract,
    RebatePaid,
    Spot,
    Strike,
    Barrier,
    Rebate,
    Expiry,
    Vol,
    Rate,
    Dividend,
}

impl Field {
    pub(crate) const ALL: [Field; 11] = [
        Field::Id,
        Field::Contract,
        Field::RebatePaid,
        Field::Spot,
        Field::Strike,
        Field::Barrier,
        Field::Rebate,
        Field::Expiry,
        Field::Vol,
        Field::Rate,
        Field::Dividend,
    ];

    /// Those that hold numbers, in the order of the columns of a block.
    pub(crate) const NUMBERS: [Field; 8] = [
        Field::Spot,
        Field::Strike,
        Field::Barrier,
        Field::Rebate,
        Field::Expiry,
        Field::Vol,
        Field::Rate,
        Field::Dividend,
    ];

    pub(crate) const fn name(self) -> &'static str {
        match self {
            Field::Id => "id",
            Field::Contract => "contract",
            Field::RebatePaid => "rebate_paid",
            Field::Spot => "spot",
            Field::Strike => "strike",
            Field::Barrier => "barrier",
            Field::Rebate => "rebate",
            Field::Expiry => "expiry",
            Field::Vol => "vol",
            Field::Rate => "rate",
            Field::Dividend => "dividend",
        }
    }

    /// Whether a header may lack the column: empty has a meaning in every row of these.
    const fn may_be_absent(self) -> bool {
        matches!(self, Field::Rebate | Field::RebatePaid)
    }
}

impl fmt::Display for Field {
    fn fmt(&self, f: &mut fmt::Formatter<'_>) -> fmt::Result {
        f.write_str(self.name())
    }
}

/// Where each column stands.
#[derive(Debug)]
pub(crate) struct Layout {
    positions: [Option<usize>; Field::ALL.len()],
    /// How many fields a row has.
    pub(crate) width: usize,
    /// The columns that the program has no use for.
    pub(crate) unread: Vec<String>,
}

impl Layout {
    /// Reads a header; says which column is missing or stands twice.
    pub(crate) fn from_header(header: &Row) -> Result<Layout, String> {
        let mut layout = Layout { positions: [None; Field::ALL.len()], width: header.len(), unread: Vec::new() };
        for (position, name) in header.iter().map(<[u8]>::trim_ascii).enumerate() {
            match Field::ALL.into_iter().find(|field| field.name().as_bytes() == name) {
                None => layout.unread.push(String::from_utf8_lossy(name).into_owned()),
                Some(field) => {
                    if layout.positions[field as usize].replace(position).is_some() {
                        return Err(format!("column {field} stands twice in the header"));
                    }
                }
            }
        }
        for field in Field::ALL {
            if layout.positions[field as usize].is_none() && !field.may_be_absent() {
                return Err(format!("column {field} is missing from the header"));
            }
        }
        Ok(layout)
    }

    /// The text of a row in a column, without the blanks around it; empty where the row does not have it.
    pub(crate) fn text<'r>(&self, row: &'r Row, field: Field) -> &'r [u8] {
        self.positions[field as usize].and_then(|position| row.get(position)).unwrap_or_default().trim_ascii()
    }

    /// The first column, in the order of the header, that a row of so many fields does not reach.
    pub(crate) fn first_beyond(&self, fields: usize) -> Option<Field> {
        let position = |field: &Field| self.positions[*field as usize];
        Field::ALL.into_iter().filter(|field| position(field) >= Some(fields)).min_by_key(position)
    }
}

#[cfg(test)]
mod tests {
    use super::*;
    use crate::rows::Rows;

    const NAMES: [&str; 11] =
        ["id", "contract", "spot", "strike", "barrier", "rebate", "rebate_paid", "expiry", "vol", "rate", "dividend"];

    fn row(fields: &[&str]) -> Row {
        let mut row = Row::default();
        assert!(Rows::new(fields.join(",").as_bytes()).next(&mut row).unwrap());
        row
    }

    #[test]
    fn columns_are_found_by_name_in_any_order() {
        let mut names = NAMES.to_vec();
        names.reverse();
        names.insert(3, "desk");
        let layout = Layout::from_header(&row(&names)).unwrap();
        let row = row(&names);
        for field in Field::ALL {
            assert_eq!(layout.text(&row, field), field.name().as_bytes());
        }
        assert_eq!(layout.unread, ["desk"]);
        assert_eq!(layout.first_beyond(12), None);
        assert_eq!(layout.first_beyond(3), Some(Field::Expiry));
    }

    #[test]
    fn a_missing_or_double_column_is_named() {
        for name in NAMES {
            let others: Vec<&str> = NAMES.into_iter().filter(|other| *other != name).collect();
            let twice: Vec<&str> = NAMES.into_iter().chain([name]).collect();
            let missing = Layout::from_header(&row(&others)).err();
            let wanted = format!("column {name} is missing from the header");
            assert_eq!(missing, (!name.starts_with("rebate")).then_some(wanted));
            let double = Layout::from_header(&row(&twice)).unwrap_err();
            assert_eq!(double, format!("column {name} stands twice in the header"));
        }
    }
}
