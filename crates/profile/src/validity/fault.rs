//! What can be wrong with the loops of a region.

use glam::DVec2;

/// An edge of a region's loops, by the place it has there.
#[derive(Debug, Clone, Copy, PartialEq, Eq, PartialOrd, Ord)]
pub struct EdgeRef {
    /// Its loop: 0 is the outer one, 1 the first void.
    pub loop_index: usize,
    /// Its index in the loop. In a [`RegionFault`] that is the loop as it was given, before any reversal.
    pub edge: usize,
    /// Its tag.
    pub tag: u32,
}

/// Why loops do not make a [`Region`](crate::Region). Places are points (r, z) in metres.
///
/// Two edges of different loops (`first.loop_index != second.loop_index`) say that a void meets the outline or another
/// void.
#[derive(Debug, Clone, Copy, PartialEq, thiserror::Error)]
#[non_exhaustive]
pub enum RegionFault {
    /// A coordinate, an angle or a distance is not a finite number. Nothing else is asked of the loop.
    #[error("edge {edge} holds a number that is not finite")]
    NotFinite {
        /// The edge.
        edge: EdgeRef,
    },
    /// The loop reaches farther than f64 can square ([`LARGEST`](crate::LARGEST)). Nothing else is asked of it.
    #[error("loop {loop_index} reaches {extent:e} m, farther than can be computed with")]
    TooLarge {
        /// The loop.
        loop_index: usize,
        /// Its largest coordinate or extent.
        extent: f64,
        /// The corner that lies farthest out.
        at: DVec2,
    },
    /// The loop is smaller than f64 can square ([`SMALLEST`](crate::SMALLEST)). Nothing else is asked of it.
    #[error("loop {loop_index} measures {extent:e} m, smaller than can be computed with")]
    TooSmall {
        /// The loop.
        loop_index: usize,
        /// Its largest extent.
        extent: f64,
        /// Where it starts.
        at: DVec2,
    },
    /// An edge ends where it starts, or differs from that by less than rounding.
    #[error("edge {edge} has no length")]
    NoLength {
        /// The edge.
        edge: EdgeRef,
        /// Where it is.
        at: DVec2,
    },
    /// Two edges cross.
    #[error("edge {first} crosses edge {second} at {at}")]
    Crosses {
        /// The edge that comes first.
        first: EdgeRef,
        /// The other one.
        second: EdgeRef,
        /// Where.
        at: DVec2,
    },
    /// Two edges that are not neighbours touch, or neighbours touch again away from their common corner.
    #[error("edge {first} touches edge {second} at {at}")]
    Touches {
        /// The edge that comes first.
        first: EdgeRef,
        /// The other one.
        second: EdgeRef,
        /// Where.
        at: DVec2,
    },
    /// Two edges run along each other for a while; of neighbours: the outline turns straight back.
    #[error("edge {first} runs along edge {second} from {from} to {to}")]
    RunsAlong {
        /// The edge that comes first.
        first: EdgeRef,
        /// The other one.
        second: EdgeRef,
        /// Where the common stretch starts, in the first edge's direction.
        from: DVec2,
        /// Where it ends.
        to: DVec2,
    },
    /// So many curved edges lie closer to each other than they bulge that it cannot be asked in reasonable time which of them
    /// meet. Whether they do is not known.
    #[error("edge {edge} is one of too many curved edges nested too closely, at {at}")]
    TooIntricate {
        /// One of them.
        edge: EdgeRef,
        /// Where it starts.
        at: DVec2,
    },
    /// An edge crosses or touches itself.
    #[error("edge {edge} crosses itself at {at}")]
    CrossesItself {
        /// The edge.
        edge: EdgeRef,
        /// Where.
        at: DVec2,
    },
    /// An edge turns straight back: a parallel curve at or beyond its base's centre of curvature, or a Bezier on a straight
    /// line that runs past its end and comes back.
    #[error("edge {edge} turns straight back at {at}")]
    TurnsBack {
        /// The edge.
        edge: EdgeRef,
        /// Where.
        at: DVec2,
    },
    /// An edge dips below the axis, r < 0.
    #[error("edge {edge} dips below the axis to {at}")]
    BelowAxis {
        /// The edge.
        edge: EdgeRef,
        /// Its lowest place.
        at: DVec2,
    },
    /// A loop encloses no area, or less than rounding can tell from none. Asked of loops without another fault.
    #[error("loop {loop_index} encloses no area")]
    NoArea {
        /// The loop.
        loop_index: usize,
        /// Where it starts.
        at: DVec2,
    },
    /// A void lies outside its body, without meeting its outline.
    #[error("void {void} lies outside the outline at {at}")]
    VoidOutside {
        /// The void's loop index, 1 for the first.
        void: usize,
        /// A place on the void.
        at: DVec2,
    },
    /// A void lies inside another void, without meeting it.
    #[error("void {void} lies inside void {within} at {at}")]
    VoidInVoid {
        /// The inner void's loop index.
        void: usize,
        /// The outer void's loop index.
        within: usize,
        /// A place on the inner void.
        at: DVec2,
    },
}

impl RegionFault {
    /// The loop concerned, the first one where there are two.
    pub fn loop_index(&self) -> usize {
        match *self {
            Self::TooLarge { loop_index, .. }
            | Self::TooSmall { loop_index, .. }
            | Self::NoArea { loop_index, .. } => loop_index,
            Self::VoidOutside { void, .. } | Self::VoidInVoid { void, .. } => void,
            _ => self.edges().next().map_or(0, |edge| edge.loop_index),
        }
    }

    /// The loops concerned, one or two.
    pub(super) fn loops(&self) -> impl Iterator<Item = usize> {
        let of_edges = self.edges().map(|edge| edge.loop_index);
        std::iter::once(self.loop_index()).chain(of_edges)
    }

    /// What faults are ordered by: the loop and the edge, the first of two.
    pub(super) fn order(&self) -> (usize, usize) {
        let edge = self.edges().next().map_or(0, |edge| edge.edge);
        (self.loop_index(), edge)
    }

    /// The edges concerned, none to two.
    pub fn edges(&self) -> impl Iterator<Item = EdgeRef> {
        let (first, second) = match *self {
            Self::NotFinite { edge }
            | Self::NoLength { edge, .. }
            | Self::TooIntricate { edge, .. }
            | Self::CrossesItself { edge, .. }
            | Self::TurnsBack { edge, .. }
            | Self::BelowAxis { edge, .. } => (Some(edge), None),
            Self::Crosses { first, second, .. }
            | Self::Touches { first, second, .. }
            | Self::RunsAlong { first, second, .. } => (Some(first), Some(second)),
            Self::TooLarge { .. }
            | Self::TooSmall { .. }
            | Self::NoArea { .. }
            | Self::VoidOutside { .. }
            | Self::VoidInVoid { .. } => (None, None),
        };
        first.into_iter().chain(second)
    }

    /// The place (r, z) to show; none where a coordinate is not a number.
    pub fn place(&self) -> Option<DVec2> {
        match *self {
            Self::NotFinite { .. } => None,
            Self::TooLarge { at, .. }
            | Self::TooSmall { at, .. }
            | Self::NoLength { at, .. }
            | Self::Crosses { at, .. }
            | Self::Touches { at, .. }
            | Self::RunsAlong { from: at, .. }
            | Self::TooIntricate { at, .. }
            | Self::CrossesItself { at, .. }
            | Self::TurnsBack { at, .. }
            | Self::BelowAxis { at, .. }
            | Self::NoArea { at, .. }
            | Self::VoidOutside { at, .. }
            | Self::VoidInVoid { at, .. } => Some(at),
        }
    }
}

impl std::fmt::Display for EdgeRef {
    fn fmt(&self, f: &mut std::fmt::Formatter<'_>) -> std::fmt::Result {
        write!(f, "{}.{}", self.loop_index, self.edge)
    }
}
