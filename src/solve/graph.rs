//! In which order objects are solved, and what stands in the way: missing names and cycles. Without recursion, so
//! that a chain of any length is only long.

use std::collections::BTreeSet;
use std::sync::Arc;

use crate::fault::{Fault, Kind, ObjectId, nearest};
use crate::scene::{Event, FramePart, Line, LineOrParticle, Scene, State, When, Whole};

/// The kinds that take part in solving, in the order of their node numbers.
const KINDS: [Kind; 5] = [
    Kind::Event,
    Kind::Line,
    Kind::Particle,
    Kind::Collision,
    Kind::Frame,
];

/// So many missing names are answered with the nearest one, each looked for among so many.
const SUGGESTED: usize = 20;
const MOST_KNOWN: usize = 10_000;

/// One object as a node: its kind and its index in the scene's list of that kind.
#[derive(Clone, Copy, Debug, PartialEq, Eq, PartialOrd, Ord)]
pub(super) struct Node {
    pub(super) kind: Kind,
    pub(super) index: usize,
}

/// The order of solving, and everything that cannot be solved for want of a name or because it hangs on itself.
#[derive(Debug)]
pub(super) struct Order {
    /// Nodes, each after all it depends on.
    pub(super) nodes: Vec<Node>,
    /// For each node (by number) whether it is left out from the start.
    pub(super) out: BTreeSet<Node>,
    /// What each node depends on.
    needs: Vec<Vec<usize>>,
    starts: [usize; 6],
    /// Faults found on the way.
    pub(super) faults: Vec<Fault>,
}

impl Order {
    /// What a node depends on.
    pub(super) fn needs(&self, node: Node) -> impl Iterator<Item = Node> + '_ {
        self.needs[self.number(node)].iter().map(|&n| self.node(n))
    }

    fn number(&self, node: Node) -> usize {
        let kind = KINDS.iter().position(|&k| k == node.kind).unwrap_or(0);
        self.starts[kind] + node.index
    }

    fn node(&self, number: usize) -> Node {
        let kind = (0..KINDS.len())
            .rev()
            .find(|&k| self.starts[k] <= number)
            .unwrap_or(0);
        Node {
            kind: KINDS[kind],
            index: number - self.starts[kind],
        }
    }

    /// Orders the objects of a scene. `closers` gives the collision that closes each particle, where one does.
    pub(super) fn of(scene: &Scene, closers: &[Closer], unread: &[ObjectId]) -> Self {
        let counts = KINDS.map(|k| count(scene, k));
        let mut starts = [0; 6];
        for k in 0..KINDS.len() {
            starts[k + 1] = starts[k] + counts[k];
        }
        let mut order = Self {
            nodes: Vec::new(),
            out: BTreeSet::new(),
            needs: vec![Vec::new(); starts[KINDS.len()]],
            starts,
            faults: Vec::new(),
        };
        let all_unread: BTreeSet<&ObjectId> = unread.iter().collect();
        for number in 0..order.needs.len() {
            let node = order.node(number);
            let mut references = Vec::new();
            collect(scene, node, closers, &mut |kind, name, field| {
                references.push((kind, name.to_owned(), field.to_owned()));
            });
            for (kind, name, field) in references {
                order.follow(scene, node, &all_unread, (kind, &name, &field));
            }
            for (field, name) in places_named(scene, node) {
                let is_unread = all_unread.contains(&ObjectId::new(Kind::Event, name));
                if !is_unread && index_of(scene, Kind::Event, name).is_none() {
                    order.follow(scene, node, &all_unread, (Kind::Event, name, field));
                }
            }
        }
        order.sort(scene);
        order
    }

    fn follow(
        &mut self,
        scene: &Scene,
        node: Node,
        unread: &BTreeSet<&ObjectId>,
        (kind, name, field): (Kind, &str, &str),
    ) {
        if let Some(index) = index_of(scene, kind, name) {
            let number = self.number(node);
            let needed = self.number(Node { kind, index });
            self.needs[number].push(needed);
            return;
        }
        self.out.insert(node);
        if unread.contains(&ObjectId::new(kind, name)) {
            return;
        }
        let object = id_of(scene, node);
        let count = if self.faults.len() < SUGGESTED {
            MOST_KNOWN
        } else {
            0
        };
        let known = names(scene, kind).take(count);
        self.faults.push(missing(object, field, kind, name, known));
    }

    /// Kahn's order; what remains hangs on a cycle.
    fn sort(&mut self, scene: &Scene) {
        let total = self.needs.len();
        let mut waiting: Vec<usize> = self.needs.iter().map(Vec::len).collect();
        let mut feeds = vec![Vec::new(); total];
        for (number, needs) in self.needs.iter().enumerate() {
            for &needed in needs {
                feeds[needed].push(number);
            }
        }
        let mut ready: Vec<usize> = (0..total).filter(|&n| waiting[n] == 0).collect();
        let mut next = 0;
        while let Some(&number) = ready.get(next) {
            next += 1;
            for &fed in &feeds[number] {
                waiting[fed] -= 1;
                if waiting[fed] == 0 {
                    ready.push(fed);
                }
            }
        }
        self.nodes = ready.iter().map(|&n| self.node(n)).collect();
        let stuck: Vec<usize> = (0..total).filter(|&n| waiting[n] > 0).collect();
        for &number in &stuck {
            let node = self.node(number);
            self.out.insert(node);
        }
        self.name_cycles(scene, &stuck, &waiting);
    }

    /// Walks from each stuck node along the first stuck thing it needs; a node met twice in one walk closes a cycle.
    fn name_cycles(&mut self, scene: &Scene, stuck: &[usize], waiting: &[usize]) {
        let mut walk_of = vec![0usize; self.needs.len()];
        for (walk, &start) in (1..).zip(stuck) {
            let mut path = Vec::new();
            let mut at = start;
            while walk_of[at] == 0 {
                walk_of[at] = walk;
                path.push(at);
                match self.needs[at].iter().find(|&&n| waiting[n] > 0) {
                    Some(&n) => at = n,
                    None => break,
                }
            }
            let Some(first) = path
                .iter()
                .position(|&n| n == at)
                .filter(|_| walk_of[at] == walk)
            else {
                continue;
            };
            if !self.needs[path[path.len() - 1]].contains(&at) {
                continue;
            }
            self.faults.push(self.cycle_fault(scene, &path[first..]));
        }
    }

    fn cycle_fault(&self, scene: &Scene, cycle: &[usize]) -> Fault {
        let first = (0..cycle.len()).min_by_key(|&i| cycle[i]).unwrap_or(0);
        let mut words: Vec<String> = (0..=cycle.len())
            .map(|i| id_of(scene, self.node(cycle[(first + i) % cycle.len()])).to_string())
            .collect();
        if words.len() > 9 {
            let more = words.len() - 8;
            words.splice(5..words.len() - 3, [format!("{more} more")]);
        }
        let object = id_of(scene, self.node(cycle[first]));
        let what = if cycle.len() == 1 {
            format!("{object} depends on itself")
        } else {
            format!("these depend on one another: {}", words.join(" -> "))
        };
        Fault::new(object, "", what, "give one of them without the others")
    }
}

/// The fault of a name that is not there.
fn missing<'a>(
    object: ObjectId,
    field: &str,
    kind: Kind,
    name: &str,
    known: impl Iterator<Item = &'a str>,
) -> Fault {
    let mend = match nearest(name, known) {
        Some(near) => format!("perhaps \"{near}\" is meant"),
        None => "add one of that name, or name another".to_owned(),
    };
    Fault::new(
        object,
        field,
        format!("there is no {} named \"{name}\"", kind.word()),
        mend,
    )
}

fn count(scene: &Scene, kind: Kind) -> usize {
    match kind {
        Kind::Event => scene.events.len(),
        Kind::Line => scene.lines.len(),
        Kind::Particle => scene.particles.len(),
        Kind::Collision => scene.collisions.len(),
        Kind::Frame => scene.frames.len(),
        Kind::Scene | Kind::Species | Kind::Plate => 0,
    }
}

/// The index of an object of a kind by name.
pub(super) fn index_of(scene: &Scene, kind: Kind, name: &str) -> Option<usize> {
    match kind {
        Kind::Event => scene.events.get_index_of(name),
        Kind::Line => scene.lines.get_index_of(name),
        Kind::Particle => scene.particles.get_index_of(name),
        Kind::Collision => scene.collisions.get_index_of(name),
        Kind::Frame => scene.frames.get_index_of(name),
        Kind::Scene | Kind::Species | Kind::Plate => None,
    }
}

/// All names of a kind.
fn names(scene: &Scene, kind: Kind) -> Box<dyn Iterator<Item = &str> + '_> {
    match kind {
        Kind::Event => Box::new(scene.events.keys().map(|n| &**n)),
        Kind::Line => Box::new(scene.lines.keys().map(|n| &**n)),
        Kind::Particle => Box::new(scene.particles.keys().map(|n| &**n)),
        Kind::Collision => Box::new(scene.collisions.keys().map(|n| &**n)),
        Kind::Frame => Box::new(
            scene
                .frames
                .keys()
                .map(|n| &**n)
                .chain(std::iter::once(scene.base.as_str())),
        ),
        Kind::Scene | Kind::Species | Kind::Plate => Box::new(std::iter::empty()),
    }
}

/// A node's name.
pub(super) fn name_of(scene: &Scene, node: Node) -> Arc<str> {
    let key = match node.kind {
        Kind::Event => scene.events.get_index(node.index).map(|e| e.0),
        Kind::Line => scene.lines.get_index(node.index).map(|e| e.0),
        Kind::Particle => scene.particles.get_index(node.index).map(|e| e.0),
        Kind::Collision => scene.collisions.get_index(node.index).map(|e| e.0),
        Kind::Frame => scene.frames.get_index(node.index).map(|e| e.0),
        Kind::Scene | Kind::Species | Kind::Plate => None,
    };
    key.cloned().unwrap_or_else(|| "".into())
}

/// A node as an object.
pub(super) fn id_of(scene: &Scene, node: Node) -> ObjectId {
    ObjectId {
        kind: node.kind,
        name: name_of(scene, node),
    }
}

type Sink<'a> = &'a mut dyn FnMut(Kind, &str, &str);

/// Every name a node depends on: kind, name, field.
fn collect(scene: &Scene, node: Node, closers: &[Closer], sink: Sink<'_>) {
    let index = node.index;
    match node.kind {
        Kind::Event => scene
            .events
            .get_index(index)
            .into_iter()
            .for_each(|(_, o)| event(scene, &o.form, sink)),
        Kind::Line => scene
            .lines
            .get_index(index)
            .into_iter()
            .for_each(|(_, o)| line(scene, &o.form, sink)),
        Kind::Particle => scene
            .particles
            .get_index(index)
            .into_iter()
            .for_each(|(_, o)| {
                frame_name(scene, &o.form.when, sink);
                if let Some((name, _)) = closers[index]
                    .by
                    .and_then(|c| scene.collisions.get_index(c))
                {
                    sink(Kind::Collision, name, "state");
                }
            }),
        Kind::Collision => collision(scene, index, closers, sink),
        Kind::Frame => scene
            .frames
            .get_index(index)
            .into_iter()
            .for_each(|(_, o)| {
                frame(scene, &o.form.part, sink);
                if let Some(origin) = &o.form.origin {
                    sink(Kind::Event, origin, "origin");
                }
            }),
        Kind::Scene | Kind::Species | Kind::Plate => {}
    }
}

/// Events that an object names without depending on them: they must be there, no more.
fn places_named(scene: &Scene, node: Node) -> Vec<(&'static str, &str)> {
    let named = match node.kind {
        Kind::Line => scene
            .lines
            .get_index(node.index)
            .map(|(_, o)| match &o.form {
                Line::Free { from, until, .. }
                | Line::Light { from, until, .. }
                | Line::Follows { from, until, .. } => vec![("from", from), ("until", until)],
                Line::Broken { .. } => Vec::new(),
            }),
        Kind::Collision => scene
            .collisions
            .get_index(node.index)
            .map(|(_, o)| vec![("at", &o.form.at)]),
        Kind::Event | Kind::Particle | Kind::Frame | Kind::Scene | Kind::Species | Kind::Plate => {
            None
        }
    };
    let named = named.unwrap_or_default().into_iter();
    named
        .filter_map(|(field, name)| Some((field, name.as_deref()?)))
        .collect()
}

fn frame_name(scene: &Scene, when: &When, sink: Sink<'_>) {
    match when {
        When::Frame(name) if *name != scene.base => sink(Kind::Frame, name, "frame"),
        When::Frame(_) | When::Base | When::Rapidity(_) => {}
    }
}

fn event(scene: &Scene, form: &Event, sink: Sink<'_>) {
    match form {
        Event::At { when, t: _, x: _ } => frame_name(scene, when, sink),
        Event::Along { line, clock: _ } => sink(Kind::Line, line, "line"),
        Event::Meeting { of } => {
            sink(Kind::Line, &of[0], "of.0");
            sink(Kind::Line, &of[1], "of.1");
        }
        Event::LightFrom { event, meets } => {
            sink(Kind::Event, event, "event");
            sink(Kind::Line, meets, "meets");
        }
    }
}

/// `from` and `until` only trim a line: no dependency.
fn line(scene: &Scene, form: &Line, sink: Sink<'_>) {
    match form {
        Line::Free {
            through,
            when,
            clock,
            velocity: _,
            toward: _,
            from: _,
            until: _,
        } => {
            sink(Kind::Event, through, "through");
            frame_name(scene, when, sink);
            if let Some((event, _)) = clock {
                sink(Kind::Event, event, "clock.0");
            }
        }
        Line::Broken { through, clock } => {
            for (i, event) in through.iter().enumerate() {
                sink(Kind::Event, event, &format!("through.{i}"));
            }
            if let Some((event, _)) = clock {
                sink(Kind::Event, event, "clock.0");
            }
        }
        Line::Light {
            through,
            toward: _,
            from: _,
            until: _,
        } => sink(Kind::Event, through, "through"),
        Line::Follows {
            particle,
            through,
            clock,
            from: _,
            until: _,
        } => {
            sink(Kind::Particle, particle, "particle");
            sink(Kind::Event, through, "through");
            if let Some((event, _)) = clock {
                sink(Kind::Event, event, "clock.0");
            }
        }
    }
}

/// A collision depends on all its particles but the one it closes.
fn collision(scene: &Scene, index: usize, closers: &[Closer], sink: Sink<'_>) {
    let Some((_, object)) = scene.collisions.get_index(index) else {
        return;
    };
    for (side, names) in [
        ("before", &object.form.before),
        ("after", &object.form.after),
    ] {
        for (i, name) in names.iter().enumerate() {
            let closes = scene
                .particles
                .get_index_of(name.as_str())
                .is_some_and(|p| closers[p].by == Some(index));
            if !closes {
                sink(Kind::Particle, name, &format!("{side}.{i}"));
            }
        }
    }
}

fn frame(scene: &Scene, part: &FramePart, sink: Sink<'_>) {
    match part {
        FramePart::Moving {
            when,
            velocity: _,
            toward: _,
            angle: _,
        } => frame_name(scene, when, sink),
        FramePart::RestOf(LineOrParticle::Line { line, at }) => {
            sink(Kind::Line, line, "line");
            if let Some(event) = at {
                sink(Kind::Event, event, "at");
            }
        }
        FramePart::RestOf(LineOrParticle::Particle(name)) => sink(Kind::Particle, name, "particle"),
        FramePart::CentreOfMomentum {
            of: Whole::Collision(collision),
        } => sink(Kind::Collision, collision, "of"),
        FramePart::CentreOfMomentum {
            of: Whole::Particles(particles),
        } => {
            for (i, name) in particles.iter().enumerate() {
                sink(Kind::Particle, name, &format!("of.{i}"));
            }
        }
    }
}

/// What collisions have to do with a particle that is Closing.
#[derive(Clone, Copy, Debug, Default, PartialEq, Eq)]
pub(super) struct Closer {
    /// The collision that finds it.
    pub(super) by: Option<usize>,
    /// The first one that names it.
    pub(super) first: Option<usize>,
}

/// Which collision closes each closing particle: a collision whose rule can close one thing and that has exactly one
/// particle still unknown closes it, again and again, in the scene's order.
pub(super) fn closers(scene: &Scene) -> Vec<Closer> {
    let mut closers = vec![Closer::default(); scene.particles.len()];
    let unknown = |p: usize| {
        scene
            .particles
            .get_index(p)
            .is_some_and(|(_, o)| matches!(o.form.state, State::Closing))
    };
    let mut open: Vec<BTreeSet<usize>> = Vec::new();
    let mut users: Vec<Vec<usize>> = vec![Vec::new(); scene.particles.len()];
    for (c, object) in scene.collisions.values().enumerate() {
        let mut set = BTreeSet::new();
        for name in object.form.before.iter().chain(&object.form.after) {
            if let Some(p) = scene
                .particles
                .get_index_of(name.as_str())
                .filter(|&p| unknown(p))
            {
                set.insert(p);
                users[p].push(c);
                closers[p].first = closers[p].first.or(Some(c));
            }
        }
        open.push(set);
    }
    let can_close = |c: usize| {
        scene
            .collisions
            .get_index(c)
            .is_some_and(|(_, o)| o.form.closure != crate::scene::Closure::Given)
    };
    let mut ready: BTreeSet<usize> = (0..open.len())
        .filter(|&c| open[c].len() == 1 && can_close(c))
        .collect();
    while let Some(c) = ready.pop_first() {
        let Some(&p) = open[c].first() else { continue };
        closers[p].by = Some(c);
        for &user in &users[p] {
            open[user].remove(&p);
            if open[user].len() == 1 && can_close(user) {
                ready.insert(user);
            } else {
                ready.remove(&user);
            }
        }
    }
    closers
}
