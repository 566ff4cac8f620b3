using GuideModes.Tests.GraphSamples;
using GuideModes.Tests.GraphSamples.Used;

namespace GuideModes.Tests
{
    /// <summary>The architecture test is worth what its reader sees: each sample hides one use in one place.</summary>
    public sealed class NamespaceGraphTests
    {
        [Theory]
        [InlineData(nameof(ByBaseType))]
        [InlineData(nameof(ByInterface))]
        [InlineData(nameof(ByConstraint<Thing>))]
        [InlineData(nameof(ByAttribute))]
        [InlineData(nameof(ByAttributeArgument))]
        [InlineData(nameof(ByField))]
        [InlineData(nameof(ByParameter))]
        [InlineData(nameof(ByReturnType))]
        [InlineData(nameof(ByGenericArgument))]
        [InlineData(nameof(ByArrayElement))]
        [InlineData(nameof(ByCall))]
        [InlineData(nameof(ByGenericCall))]
        [InlineData(nameof(ByTypeof))]
        [InlineData(nameof(ByCatch))]
        [InlineData(nameof(ByLambda))]
        [InlineData(nameof(ByIterator))]
        [InlineData(nameof(ByNestedType))]
        public void Read_TypeThatUsesAnotherInOnePlace_FindsTheUse(string sample)
        {
            var uses = NamespaceGraph.Read(typeof(NamespaceGraphTests).Assembly);

            Assert.Contains(uses, use => Strip(use.From) == sample && use.ToNamespace == typeof(Thing).Namespace);
        }

        [Fact]
        public void Read_TypeThatUsesNothing_FindsNoUse()
        {
            var uses = NamespaceGraph.Read(typeof(NamespaceGraphTests).Assembly);

            Assert.DoesNotContain(uses, use => use.From == nameof(UsesNothing) && use.ToNamespace == typeof(Thing).Namespace);
        }

        [Fact]
        public void Namespaces_OfThisAssembly_HoldTheSamples()
        {
            var names = NamespaceGraph.Namespaces(typeof(NamespaceGraphTests).Assembly);

            Assert.Contains("GuideModes.Tests.GraphSamples.Used", names);
        }

        private static string Strip(string name) => name.Split('`')[0];
    }
}

namespace GuideModes.Tests.GraphSamples.Used
{
    internal class Thing
    {
        public static int Count() => 1;

        public static int CountOf<T>() => typeof(T).Name.Length;
    }

    internal interface IThing;

    [AttributeUsage(AttributeTargets.Class)]
    internal sealed class MarkAttribute : Attribute;

    internal sealed class ThingException : Exception;
}

#pragma warning disable CS0649 // The samples are read, never run.
namespace GuideModes.Tests.GraphSamples
{
    [AttributeUsage(AttributeTargets.Class)]
    internal sealed class TypeMarkAttribute(Type[] types) : Attribute
    {
        public Type[] Types { get; } = types;
    }

    internal sealed class Own
    {
        public static int CountOf<T>() => typeof(T).Name.Length;
    }

    internal sealed class UsesNothing
    {
        public static int Count() => Own.CountOf<int>();
    }

    internal sealed class ByBaseType : Thing;

    internal sealed class ByInterface : IThing;

    internal sealed class ByConstraint<T>
        where T : Thing;

    [Mark]
    internal sealed class ByAttribute;

    [TypeMark([typeof(Thing)])]
    internal sealed class ByAttributeArgument;

    internal sealed class ByField
    {
        public Thing? Held;
    }

    internal sealed class ByParameter
    {
        public static void Take(ref Thing _)
        {
        }
    }

    internal sealed class ByReturnType
    {
        public static Thing? Give() => null;
    }

    internal sealed class ByGenericArgument
    {
        public List<KeyValuePair<int, Thing>>? Held;
    }

    internal sealed class ByArrayElement
    {
        public Thing[][]? Held;
    }

    internal sealed class ByCall
    {
        public static int Count() => Thing.Count();
    }

    internal sealed class ByGenericCall
    {
        public static int Count() => Own.CountOf<Thing>();
    }

    internal sealed class ByTypeof
    {
        public static string Name() => typeof(Thing).Name;
    }

    internal sealed class ByCatch
    {
        public static bool Try(Action action)
        {
            try
            {
                action();
                return true;
            }
            catch (ThingException)
            {
                return false;
            }
        }
    }

    internal sealed class ByLambda
    {
        public static Func<int> Count() => () => Thing.Count();
    }

    internal sealed class ByIterator
    {
        public static IEnumerable<int> Counts()
        {
            yield return Thing.Count();
        }
    }

    internal sealed class ByNestedType
    {
        internal sealed class Inner
        {
            public static int Count() => Thing.Count();
        }
    }
}
