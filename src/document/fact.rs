//! Plain data that templates can read: each struct is written once and knows the names of its own fields.
use minijinja::Value;

/// Something a template can read.
pub(super) trait Fact {
    /// The same, as the template engine holds it.
    fn value(&self) -> Value;
}

impl Fact for String {
    fn value(&self) -> Value {
        Value::from(self.as_str())
    }
}

impl Fact for bool {
    fn value(&self) -> Value {
        Value::from(*self)
    }
}

impl Fact for usize {
    fn value(&self) -> Value {
        Value::from(*self)
    }
}

impl<T: Fact> Fact for Vec<T> {
    fn value(&self) -> Value {
        self.iter().map(Fact::value).collect()
    }
}

impl<T: Fact> Fact for Option<T> {
    fn value(&self) -> Value {
        self.as_ref().map_or(Value::from(()), Fact::value)
    }
}

/// Writes a struct with its [`Fact`], so that no field can be forgotten.
macro_rules! facts {
    ($($(#[$about:meta])* $name:ident { $($(#[$doc:meta])* $field:ident: $kind:ty,)* })*) => { $(
        $(#[$about])*
        #[derive(Debug, Clone, Default, PartialEq)]
        pub struct $name { $($(#[$doc])* pub $field: $kind,)* }

        impl $crate::document::fact::Fact for $name {
            fn value(&self) -> minijinja::Value {
                minijinja::Value::from_pairs([$((stringify!($field), $crate::document::fact::Fact::value(&self.$field)),)*])
            }
        }
    )* };
}
pub(super) use facts;
