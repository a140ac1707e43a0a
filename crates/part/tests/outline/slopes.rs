//! Tapers and angles.

use crate::{assert_near, at, edges};

/// Where the second step of an outline arrives.
fn second(step: &str) -> profile::DVec2 {
    edges(&format!(
        "[ {{ r = 2, z = 0 }}, {{ r = 3 }}, {step}, {{ r = 2 }} ]"
    ))[1]
        .end()
}

#[test]
fn a_taper_is_change_of_diameter_over_length() {
    // 1:20 over 2 m is 0.1 m of diameter.
    assert_near(second("{ z = 2, taper = \"1:20\" }"), at(3.05, 2.0));
    assert_near(second("{ z = 2, taper = \"-1:20\" }"), at(2.95, 2.0));
    assert_near(second("{ dz = 2, taper = 0.05 }"), at(3.05, 2.0));
}

#[test]
fn outward_is_outward_whichever_way_the_step_goes() {
    let down = edges(
        "[ { r = 3, z = 2 }, { r = 3.5, z = 0, angle = 0 }, { r = 4 } ]"
            .replace(", angle = 0", "")
            .as_str(),
    );
    assert_eq!(down[0].end(), at(3.5, 0.0));
    let edges = edges("[ { r = 3, z = 2 }, { z = 0, taper = \"1:2\" }, { r = 5 }, { z = 2 } ]");
    assert_near(edges[0].end(), at(3.5, 0.0));
}

#[test]
fn an_angle_is_measured_from_the_axis() {
    assert_near(second("{ z = 1, angle = 45 }"), at(4.0, 1.0));
    // tan 30 degrees = 1/sqrt 3
    assert_near(
        second("{ z = 1, angle = -30 }"),
        at(3.0 - 1.0 / 3.0_f64.sqrt(), 1.0),
    );
    assert_near(second("{ r = 3.5, angle = 45 }"), at(3.5, 0.5));
}

#[test]
fn a_given_diameter_lets_the_step_go_up() {
    assert_near(second("{ d = 6.1, taper = \"1:20\" }"), at(3.05, 2.0));
    assert_near(second("{ d = 5.9, taper = \"-1:20\" }"), at(2.95, 2.0));
}

#[test]
fn a_slope_of_0_is_a_cylinder_and_a_right_angle_a_plane() {
    assert_eq!(second("{ z = 2, taper = 0 }"), at(3.0, 2.0));
    let edges = edges("[ { r = 2, z = 0 }, { r = 3, angle = 90 }, { z = 1 }, { r = 2 } ]");
    assert_eq!(edges[0].end(), at(3.0, 0.0));
}
