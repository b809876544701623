//! Header words of schedules in English, German and French, collected by ourselves; a table to add lines to.

use super::Target;
use commissioning::plant::Sheet::{self, Cable, Drive, DrivePlate, Load, Motor, Supply};

/// How much a header word says by itself.
#[derive(Clone, Copy, Debug, PartialEq, Eq)]
pub(super) enum Weight {
    /// It means this and hardly anything else.
    Plain,
    /// It often means this.
    Hint,
}

use Weight::{Hint, Plain};

type Words = &'static [&'static str];

/// Words of the tag, the name and the site.
#[rustfmt::skip]
const ABOUT: &[(&str, Weight, Words)] = &[
    ("tag", Plain, &["tag", "tag no", "tag nr", "tag number", "plant tag", "drive tag", "motor tag", "vfd tag", "vsd tag", "equipment no", "equipment number", "equipment tag", "equipment id", "kks", "akz", "bmk", "betriebsmittel", "betriebsmittelkennzeichen", "kennzeichen", "anlagenkennzeichen", "antriebsnummer", "antrieb nr", "motor no", "motor nr", "motor number", "drive no", "drive number", "repere", "repere moteur", "n deg d equipement", "numero d equipement"]),
    ("tag", Hint, &["item no", "item", "id", "motor id", "drive id", "position", "pos nr", "equipment", "reference", "ref", "code"]),
    ("name", Plain, &["name", "description", "designation", "benennung", "bezeichnung", "beschreibung", "equipment description", "equipment name", "drive description", "motor description", "service description", "libelle", "service desservi"]),
    ("name", Hint, &["service", "funktion", "function", "verbraucher", "antrieb", "drive", "equipement", "motor", "moteur"]),
    ("site", Plain, &["site", "site name", "werk", "usine", "standortwerk"]),
    ("site", Hint, &["plant", "facility"]),
];

/// Words of fields.
#[rustfmt::skip]
const FIELDS: &[(Sheet, &str, Weight, Words)] = &[
    (Motor, "volts", Plain, &["voltage", "volts", "rated voltage", "nominal voltage", "rated volts", "spannung", "nennspannung", "bemessungsspannung", "motorspannung", "tension", "tension nominale", "tension assignee"]),
    (Motor, "volts", Hint, &["un", "u", "ur"]),
    (Motor, "amps", Plain, &["current", "amps", "rated current", "rated amps", "nominal current", "full load current", "full load amps", "flc", "fla", "strom", "nennstrom", "bemessungsstrom", "motorstrom", "courant", "courant nominal", "courant assigne", "intensite", "intensite nominale"]),
    (Motor, "amps", Hint, &["in", "i nom", "ir", "i"]),
    (Motor, "hertz", Plain, &["frequency", "rated frequency", "nominal frequency", "frequenz", "nennfrequenz", "bemessungsfrequenz", "frequence", "frequence nominale"]),
    (Motor, "hertz", Hint, &["f", "freq"]),
    (Motor, "rpm", Plain, &["speed", "rated speed", "full load speed", "nominal speed", "drehzahl", "nenndrehzahl", "bemessungsdrehzahl", "motordrehzahl", "vitesse", "vitesse nominale", "vitesse de rotation"]),
    (Motor, "rpm", Hint, &["n", "nn"]),
    (Motor, "power", Plain, &["power", "rated power", "nominal power", "motor rating", "motor size", "output", "rated output", "leistung", "nennleistung", "bemessungsleistung", "motorleistung", "puissance", "puissance nominale", "puissance assignee", "horsepower"]),
    (Motor, "power", Hint, &["rating", "p", "pn", "p2", "installed power", "shaft power", "size"]),
    (Motor, "power-factor", Plain, &["power factor", "cos phi", "cosphi", "pf", "leistungsfaktor", "facteur de puissance", "cos"]),
    (Motor, "efficiency", Plain, &["efficiency", "eff", "eta", "wirkungsgrad", "rendement"]),
    (Motor, "efficiency-class", Plain, &["efficiency class", "ie class", "ie code", "energieeffizienzklasse", "effizienzklasse", "ie klasse", "classe de rendement", "classe ie"]),
    (Motor, "efficiency-class", Hint, &["ie"]),
    (Motor, "connection", Plain, &["connection", "winding connection", "schaltung", "schaltungsart", "couplage"]),
    (Motor, "service-factor", Plain, &["service factor", "betriebsfaktor", "facteur de service"]),
    (Motor, "service-factor", Hint, &["sf", "s f"]),
    (Motor, "maker", Plain, &["motor manufacturer", "motor make", "motor maker", "motorhersteller", "fabricant moteur", "constructeur moteur"]),
    (Motor, "maker", Hint, &["maker", "manufacturer", "make", "hersteller", "fabrikat", "fabricant", "constructeur", "marque"]),
    (Motor, "type", Plain, &["motor type", "motor model", "motortyp", "type moteur", "type de moteur"]),
    (Motor, "type", Hint, &["type", "model", "typ", "modell", "modele", "type designation"]),
    (Motor, "serial", Plain, &["motor serial", "motor serial no", "motor seriennummer"]),
    (Motor, "serial", Hint, &["serial", "serial no", "serial number", "s n", "sn", "fabriknummer", "fabrik nr", "seriennummer", "serien nr", "numero de serie", "n deg de serie", "no de serie"]),
    (Motor, "year", Plain, &["year", "year made", "year of manufacture", "baujahr", "annee", "annee de fabrication"]),
    (Motor, "frame", Plain, &["frame", "frame size", "motor frame", "baugroesse", "hauteur d axe"]),
    (Motor, "poles", Plain, &["poles", "no of poles", "number of poles", "pole number", "polzahl", "nombre de poles", "poles no"]),
    (Motor, "duty", Plain, &["duty", "duty type", "duty class", "betriebsart", "type de service", "service type"]),
    (Motor, "enclosure", Plain, &["enclosure", "ip", "ip rating", "ip code", "degree of protection", "schutzart", "indice de protection", "protection index"]),
    (Motor, "thermal-class", Plain, &["insulation class", "thermal class", "ins class", "waermeklasse", "isolationsklasse", "isolierstoffklasse", "classe d isolation", "classe thermique"]),
    (Motor, "cooling", Plain, &["cooling", "cooling method", "kuehlung", "kuehlart", "refroidissement"]),
    (Motor, "mass", Plain, &["weight", "mass", "gewicht", "masse", "poids"]),
    (Motor, "inertia", Plain, &["motor inertia", "rotor inertia", "rotortraegheit", "inertie moteur"]),
    (Motor, "inertia", Hint, &["inertia", "moment of inertia", "traegheitsmoment", "massentraegheitsmoment", "moment d inertie"]),
    (Motor, "hazard-marking", Plain, &["ex marking", "hazardous area marking", "ex kennzeichnung", "marquage ex", "ex"]),
    (Drive, "location", Plain, &["location", "drive location", "area", "building", "room", "standort", "einbauort", "raum", "gebaeude", "emplacement", "localisation", "batiment", "local"]),
    (Drive, "location", Hint, &["ort", "lieu", "zone", "bereich"]),
    (Drive, "panel", Plain, &["panel", "mcc", "mcc no", "cubicle", "switchboard", "compartment", "schaltschrank", "schrank", "feld", "schaltfeld", "armoire", "tableau"]),
    (Drive, "motor-location", Plain, &["motor location", "motorstandort", "emplacement moteur"]),
    (Drive, "drawings", Plain, &["drawing", "drawings", "drawing no", "schematic", "zeichnung", "schaltplan", "schema"]),
    (DrivePlate, "maker", Plain, &["drive manufacturer", "drive make", "drive maker", "vsd manufacturer", "vsd make", "vfd manufacturer", "vfd make", "umrichterhersteller", "fu hersteller", "marque variateur", "fabricant variateur"]),
    (DrivePlate, "type", Plain, &["drive type", "drive model", "vsd type", "vsd model", "vfd type", "vfd model", "inverter type", "converter type", "umrichtertyp", "fu typ", "type variateur", "type de variateur", "modele variateur"]),
    (DrivePlate, "serial", Plain, &["drive serial", "drive serial no", "vsd serial", "vfd serial", "fu seriennummer"]),
    (DrivePlate, "continuous-current", Plain, &["drive current", "drive amps", "vsd current", "vfd current", "vfd amps", "output current", "rated output current", "continuous current", "umrichterstrom", "fu strom", "ausgangsstrom", "courant variateur", "courant de sortie"]),
    (DrivePlate, "rated-power", Plain, &["drive power", "drive rating", "drive size", "vsd power", "vsd rating", "vfd power", "vfd rating", "vfd size", "umrichterleistung", "fu leistung", "puissance variateur"]),
    (DrivePlate, "firmware", Plain, &["firmware", "software version"]),
    (Cable, "number", Plain, &["cable no", "cable number", "cable tag", "kabelnummer", "kabel nr", "numero de cable", "repere cable"]),
    (Cable, "length", Plain, &["cable length", "motor cable length", "kabellaenge", "leitungslaenge", "longueur de cable", "longueur cable"]),
    (Cable, "length", Hint, &["length", "laenge", "longueur", "route length"]),
    (Cable, "cross-section", Plain, &["cross section", "cable cross section", "cable size", "conductor size", "csa", "querschnitt", "kabelquerschnitt", "leitungsquerschnitt", "section cable", "section de cable", "section des conducteurs"]),
    (Cable, "cross-section", Hint, &["section", "cable", "kabel"]),
    (Cable, "parallel", Plain, &["cables in parallel", "parallel cables", "parallel runs", "no of runs", "runs", "parallele kabel"]),
    (Load, "kind", Plain, &["driven load", "driven machine", "driven equipment", "load type", "type of load", "load kind", "machine type", "lastart", "art der last", "arbeitsmaschine", "machine entrainee", "type de charge"]),
    (Load, "kind", Hint, &["load", "machine", "application", "last", "maschine", "anwendung", "charge", "kind"]),
    (Load, "power", Plain, &["absorbed power", "power demand", "bkw", "shaft power absorbed", "wellenleistungsbedarf", "leistungsbedarf", "puissance absorbee"]),
    (Load, "gear-ratio", Plain, &["gear ratio", "gearbox ratio", "uebersetzung", "getriebeuebersetzung", "rapport de reduction"]),
    (Supply, "volts", Plain, &["supply voltage", "system voltage", "line voltage", "mains voltage", "netzspannung", "anschlussspannung", "tension reseau"]),
    (Supply, "earthing", Plain, &["earthing", "earthing system", "netzform", "regime de neutre"]),
];

/// Words that tell which part of the plant a header speaks of.
const CONTEXT: &[(Sheet, Words)] = &[
    (Motor, &["motor", "motors", "moteur", "mot", "motordaten"]),
    (
        DrivePlate,
        &["drive", "vfd", "vsd", "asd", "fu", "umrichter", "frequenzumrichter", "inverter", "converter", "variateur"],
    ),
    (Cable, &["cable", "cables", "kabel", "leitung", "motorkabel"]),
    (Load, &["load", "driven", "last", "arbeitsmaschine", "machine", "charge"]),
    (Supply, &["supply", "feeder", "netz", "einspeisung", "reseau", "alimentation"]),
];

/// Every line of the table: words in plain spelling, what they mean, and how surely.
pub(super) fn lines() -> impl Iterator<Item = (Target, Weight, Words)> {
    let about = ABOUT.iter().map(|(what, weight, words)| {
        let target = match *what {
            "tag" => Target::Tag,
            "name" => Target::Name,
            _ => Target::Site,
        };
        (target, *weight, *words)
    });
    about.chain(FIELDS.iter().map(|(sheet, key, weight, words)| (Target::field(*sheet, key), *weight, *words)))
}

/// The part of the plant that a word of a header speaks of.
pub(super) fn context(word: &str) -> Option<Sheet> {
    CONTEXT.iter().find(|(_, words)| words.contains(&word)).map(|(sheet, _)| *sheet)
}

/// What a column is when its header is a unit alone, by the part of the plant above it.
pub(super) fn by_unit(kind: engineering::Kind, around: Option<Sheet>) -> Option<Target> {
    use engineering::Kind;
    let (sheet, key) = match (kind, around) {
        (Kind::Power, Some(DrivePlate)) => (DrivePlate, "rated-power"),
        (Kind::Power, Some(Load)) => (Load, "power"),
        (Kind::Power, _) => (Motor, "power"),
        (Kind::Current, Some(DrivePlate)) => (DrivePlate, "continuous-current"),
        (Kind::Current, None | Some(Motor)) => (Motor, "amps"),
        (Kind::Voltage, Some(Supply)) => (Supply, "volts"),
        (Kind::Voltage, None | Some(Motor)) => (Motor, "volts"),
        (Kind::Frequency, Some(Supply)) => (Supply, "hertz"),
        (Kind::Frequency, None | Some(Motor)) => (Motor, "hertz"),
        (Kind::Speed, None | Some(Motor)) => (Motor, "rpm"),
        (Kind::Length, None | Some(Cable)) => (Cable, "length"),
        (Kind::CrossSection, _) => (Cable, "cross-section"),
        (Kind::Mass, None | Some(Motor)) => (Motor, "mass"),
        _ => return None,
    };
    Some(Target::field(sheet, key))
}

#[cfg(test)]
mod tests {
    use super::*;
    use std::collections::BTreeMap;

    #[test]
    fn every_line_names_a_field_and_is_in_plain_spelling_once() {
        let mut seen: BTreeMap<&str, Target> = BTreeMap::new();
        for (target, _, words) in lines() {
            assert!(
                !matches!(target, Target::Field(_)) || target.description().is_some(),
                "{} is no field",
                target.key()
            );
            for word in words {
                assert_eq!(super::super::folded(word), **word, "{word} is not in plain spelling");
                if let Some(other) = seen.insert(word, target.clone()) {
                    panic!("{word} means {} and {}", other.key(), target.key());
                }
            }
        }
        assert!(seen.len() > 250);
    }
}
