//! Layouts as projects send them, and what is made of them.

use super::*;
use crate::sheets::{Address, Sheet, read};

fn sheet(text: &str) -> Sheet {
    read(text.as_bytes(), "list.csv").unwrap().sheets.remove(0)
}

/// Targets by header, and the unit beside each.
fn seen(sheet: &Sheet) -> Vec<String> {
    let found = propose(sheet);
    found
        .columns
        .iter()
        .map(|c| {
            let unit = if c.unit.is_empty() { String::new() } else { format!(" {}", c.unit) };
            format!("{}{unit}", c.target.as_ref().map_or("-".to_owned(), Target::key))
        })
        .collect()
}

#[test]
fn one_line_of_english_with_units_in_brackets() {
    let list = sheet(
        "Tag No.,Description,Motor power [kW],Voltage (V),FLC [A],Speed [rpm],cos φ,Eff. [%],Cable length (m),Cable size mm²,VFD type,VFD current [A]\n\
         M-01,Pump,75,400,134,1485,0.86,95.0,85,70,X,150\n",
    );
    assert_eq!(
        seen(&list),
        [
            "tag",
            "name",
            "motor.0.power kW",
            "motor.0.volts V",
            "motor.0.amps A",
            "motor.0.rpm rpm",
            "motor.0.power-factor",
            "motor.0.efficiency %",
            "cable.0.length m",
            "cable.0.cross-section mm²",
            "drive-plate.0.type",
            "drive-plate.0.continuous-current A"
        ]
    );
}

#[test]
fn german_and_french_headers() {
    let german = sheet(
        "AKZ;Bezeichnung;Nennleistung in kW;Nennspannung;Nennstrom;Drehzahl (1/min);Wirkungsgrad;Kabellänge;Querschnitt;Lastart;Standort\nM1;x;75;400;134;1485;0,95;85;70;Pumpe;H2\n",
    );
    assert_eq!(
        seen(&german),
        [
            "tag",
            "name",
            "motor.0.power kW",
            "motor.0.volts V",
            "motor.0.amps A",
            "motor.0.rpm rpm",
            "motor.0.efficiency of 1",
            "cable.0.length m",
            "cable.0.cross-section mm²",
            "load.0.kind",
            "drive.0.location"
        ]
    );
    let french = sheet(
        "Repère;Désignation;Puissance (kW);Tension;Courant nominal;Vitesse tr/min;Facteur de puissance;Rendement;Longueur câble;Machine entraînée\nP1;x;75;400;134;1485;0,86;95;85;pompe\n",
    );
    assert_eq!(
        seen(&french),
        [
            "tag",
            "name",
            "motor.0.power kW",
            "motor.0.volts V",
            "motor.0.amps A",
            "motor.0.rpm rpm",
            "motor.0.power-factor",
            "motor.0.efficiency %",
            "cable.0.length m",
            "load.0.kind"
        ]
    );
}

#[test]
fn titles_above_groups_and_units_below() {
    let list = sheet(
        "Motor schedule rev C;;;;;;\n;;;;;;\nTag;Service;Motor;;;Cable;VFD\n;;Power;Current;Speed;Length;Current\n;;kW;A;rpm;m;A\nM-01;Pump;75;134;1485;85;150\n",
    );
    let found = propose(&list);
    assert_eq!(found.header_rows, Some((2, 4)));
    assert_eq!(
        seen(&list),
        [
            "tag",
            "name",
            "motor.0.power kW",
            "motor.0.amps A",
            "motor.0.rpm rpm",
            "cable.0.length m",
            "drive-plate.0.continuous-current A"
        ]
    );
    assert_eq!(found.columns[3].header, "Motor Current A");
    assert_eq!(found.columns[3].samples, ["134"]);
}

#[test]
fn a_merged_heading_stands_over_all_its_columns() {
    let mut list = sheet("Tag;Motor;;Drive;\n;A;kW;A;Type\nM-01;134;75;150;X\n");
    let at = Address::new;
    list.merged = vec![(at(0, 1), at(0, 2)), (at(0, 3), at(0, 4)), (at(0, 0), at(1, 0))];
    assert_eq!(
        seen(&list),
        ["tag", "motor.0.amps A", "motor.0.power kW", "drive-plate.0.continuous-current A", "drive-plate.0.type"]
    );
}

#[test]
fn horsepower_and_unknown_columns_are_told() {
    let list = sheet("Motor No,HP,Colour,Weight\nM-01,100,blue,5 t\n");
    assert_eq!(seen(&list), ["tag", "motor.0.power hp", "-", "motor.0.mass kg"]);
    let found = propose(&list);
    assert_eq!(found.columns[3].unit_from, UnitFrom::Cells);
    assert_eq!(found.columns[1].unit_from, UnitFrom::Header);
    let nothing = propose(&sheet("1;2;3\n4;5;6\n"));
    assert_eq!((nothing.header_rows, nothing.mapping().first_row()), (None, 0), "the first row is no header then");
    assert!(nothing.mapping().faults()[0].contains("plant tag"));
    let shown = propose_at(&sheet("a;Tag\nM-01;M-02\n"), (0, 0));
    assert_eq!(shown.columns[1].target, Some(Target::Tag));
}

#[test]
fn the_same_header_is_known_again_wherever_it_stands() {
    let first = propose(&sheet("Tag;kW;Note\nM-01;75;x\n"));
    let mut corrected = first.mapping();
    corrected.columns[2].target = Some(Target::Name);
    let kept: Mapping = serde_json::from_str(&serde_json::to_string(&corrected).unwrap()).unwrap();
    let moved = propose(&sheet("Motors of hall 2\n\nTAG;kW; Note \nM-07;90;y\n"));
    let again = kept.again(&moved).expect("known again");
    assert_eq!((again.header_rows, again.first_row()), (Some((2, 2)), 3));
    assert_eq!(again.columns[2].target, Some(Target::Name));
    assert_eq!(kept.again(&propose(&sheet("Tag;Note;kW\nM-01;x;75\n"))), None, "columns changed places");
}

#[test]
fn a_mapping_with_faults_says_them() {
    let mut mapping = propose(&sheet("Tag;kW;Power\nM-01;75;75\n")).mapping();
    mapping.columns[1].target = mapping.columns[2].target.clone();
    mapping.columns[1].unit = "A".into();
    let faults = mapping.faults();
    assert!(faults.iter().any(|f| f.contains("Two columns")), "{faults:?}");
    assert!(faults.iter().any(|f| f.contains("no unit of")), "{faults:?}");
}

#[test]
fn percent_and_parts_of_one_are_told_by_what_can_be() {
    let unit = |text: &str, column: usize| {
        let found = propose(&sheet(text));
        (found.columns[column].unit.clone(), found.columns[column].unit_from)
    };
    assert_eq!(unit("Tag;Eff [%]\nM-01;0.95\nM-02;0,9\n", 1), ("of 1".into(), UnitFrom::Cells), "no motor has 0.95 %");
    assert_eq!(unit("Tag;Efficiency\nM-01;95\nM-02;90\n", 1), ("%".into(), UnitFrom::Assumed));
    let drop = "plant tag;Motor cable: voltage drop allowed [%]\nM-01;0.5\nM-02;0.9\n";
    assert_eq!(unit(drop, 1), ("%".into(), UnitFrom::Header), "half a percent can be");
}
