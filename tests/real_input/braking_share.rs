//! The one rule by which the simulated cases state their braking shares.
//!
//! In: a car of the measured block, its path and the friction. Out: the least
//! and the greatest share of the friction that held the car back along its
//! path. The heading turns from that at impact to that at rest; each wheel
//! holds back with its drag share and, across, with Fiala's side force on what
//! is left of the friction circle. Source: Fiala (1954), from memory.

use serde_json::Value;

/// Side force per load and radian of side-slip: the methods' default.
const CORNERING: f64 = 10.0;
/// Places on the path at which the forces are taken.
const STEPS: usize = 200;

/// How the turn is spread over the path: the share turned at a share `s` of
/// the path, and its slope there.
const SPREADS: [fn(f64) -> (f64, f64); 3] =
    [|s| (s, 1.0), |s| (s * (2.0 - s), 2.0 * (1.0 - s)), |s| (s * s, 2.0 * s)];

/// Least and greatest share, over the wheels' limits and the spreads.
pub fn limits(car: &Value, path: &[[f64; 2]], friction: f64) -> (f64, f64) {
    let wheels = |end: &str| {
        let share =
            |i: usize| car["wheels"][i].get(end).or(car["wheels"][i].get("k")).and_then(Value::as_f64);
        [0, 1, 2, 3].map(|i| share(i).unwrap())
    };
    let shares: Vec<f64> = ["lo", "hi"]
        .iter()
        .flat_map(|end| SPREADS.map(|spread| mean(car, path, friction, wheels(end), spread)))
        .collect();
    (shares.iter().copied().fold(1.0, f64::min), shares.iter().copied().fold(0.0, f64::max))
}

/// The share averaged over the path.
fn mean(car: &Value, path: &[[f64; 2]], mu: f64, drags: [f64; 4], spread: fn(f64) -> (f64, f64)) -> f64 {
    let number = |key: &str| car[key].as_f64().unwrap();
    let (wheelbase, front, half) = (number("wheelbase"), number("cg_to_front_axle"), number("track") / 2.0);
    let rear = wheelbase - front;
    let places = [(front, half), (front, -half), (-rear, half), (-rear, -half)];
    let loads = [rear, rear, front, front].map(|opposite| opposite / wheelbase / 2.0);
    let legs: Vec<[f64; 2]> = path.windows(2).map(|p| [p[1][0] - p[0][0], p[1][1] - p[0][1]]).collect();
    let length: f64 = legs.iter().map(|l| libm::hypot(l[0], l[1])).sum();
    let start = number("course_before_deg").to_radians();
    let turn = car["rest"]["heading_deg"].as_f64().unwrap().to_radians() - start;
    let mut total = 0.0;
    for step in 0..STEPS {
        let s = (step as f64 + 0.5) / STEPS as f64;
        let (turned, slope) = spread(s);
        let slip = course(&legs, s * length) - start - turn * turned;
        let (x, y) = (libm::cos(slip), libm::sin(slip));
        let yaw = turn * slope / length; // radians a metre of travel
        for (i, (place, load)) in places.iter().zip(loads).enumerate() {
            let steer = car["steer_deg"][i].as_f64().unwrap().to_radians();
            let (c, d) = (libm::cos(steer), libm::sin(steer));
            let (wx, wy) = (x - yaw * place.1, y + yaw * place.0);
            let (along, across) = force(wx * c + wy * d, wy * c - wx * d, drags[i], mu);
            total -= load * ((along * c - across * d) * x + (along * d + across * c) * y) / mu;
        }
    }
    total / STEPS as f64
}

/// Direction of the leg on which a point of the path lies.
fn course(legs: &[[f64; 2]], mut at: f64) -> f64 {
    let mut course = 0.0;
    for leg in legs {
        course = libm::atan2(leg[1], leg[0]);
        let length = libm::hypot(leg[0], leg[1]);
        if at <= length {
            break;
        }
        at -= length;
    }
    course
}

/// Force of the road on a wheel for each unit of load, along and across it.
fn force(along: f64, across: f64, drag: f64, mu: f64) -> (f64, f64) {
    let c = (along / libm::sqrt(along * along + across * across + 1e-6)).clamp(-drag, drag);
    let left = mu * libm::sqrt((1.0 - c * c).max(0.0));
    let t = across / libm::sqrt(along * along + 1e-6);
    let side = if left <= 1e-12 {
        0.0
    } else if t.abs() < 3.0 * left / CORNERING {
        let z = CORNERING * t;
        -(z - z * z.abs() / (3.0 * left) + z * z * z / (27.0 * left * left))
    } else {
        -left * t.signum()
    };
    (-mu * c, side)
}
