using System.Collections.Immutable;
using System.Reflection;
using System.Runtime.CompilerServices;
using GuideModes.Guides;

namespace GuideModes.Tests;

/// <summary>What the layout promises, read from the compiled library so that nobody has to remember it.</summary>
public sealed class ArchitectureTests
{
    private const string Root = "GuideModes";
    private const string Wkb = "GuideModes.Solvers.Wkb";
    private const string TransferMatrix = "GuideModes.Solvers.TransferMatrix";

    private static readonly Assembly Library = typeof(Guide).Assembly;

    /// <summary>Bottom up: a namespace may use itself and those before it.</summary>
    private static readonly ImmutableArray<string> Order =
    [
        Root,
        "GuideModes.Numerics",
        "GuideModes.Materials",
        "GuideModes.Profiles",
        "GuideModes.Guides",
        "GuideModes.Solvers",
        Wkb,
        TransferMatrix,
        "GuideModes.Solvers.Certification",
        "GuideModes.Analysis",
        "GuideModes.Studies",
        "GuideModes.Web",
    ];

    /// <summary>What would make the physics depend on the machine it runs on.</summary>
    private static readonly ImmutableArray<string> Outside =
    [
        "System.IO.File", "System.IO.FileInfo", "System.IO.FileStream", "System.IO.Directory", "System.IO.DirectoryInfo",
        "System.Console", "System.DateTime", "System.DateTimeOffset", "System.TimeProvider",
        "System.Diagnostics.Stopwatch", "System.Diagnostics.Process", "System.Threading.Thread",
        "System.Threading.ThreadPool", "System.Threading.Timer", "System.Threading.Tasks.Task",
        "System.Threading.Tasks.Parallel",
    ];

    [Fact]
    public void Namespaces_OfTheLibrary_AreAllInTheOrder()
    {
        var unknown = NamespaceGraph.Namespaces(Library).Except(Order);

        Assert.True(!unknown.Any(), $"Give these a place in the order: {string.Join(", ", unknown)}");
    }

    [Fact]
    public void Uses_BetweenNamespaces_PointDownward()
    {
        var upward = NamespaceGraph.Read(Library)
            .Where(use => IsOurs(use.ToNamespace) && Order.IndexOf(use.ToNamespace) > Order.IndexOf(use.FromNamespace));

        Assert.Empty(upward);
    }

    [Fact]
    public void Solvers_AreIndependent_NeitherUsesTheOther()
    {
        var shared = NamespaceGraph.Read(Library).Where(use =>
            (use.FromNamespace, use.ToNamespace) is (Wkb, TransferMatrix) or (TransferMatrix, Wkb));

        Assert.Empty(shared);
    }

    [Fact]
    public void Library_ReferencesNothingBeyondNumerics()
    {
        var foreign = Library.GetReferencedAssemblies().Select(name => name.Name!)
            .Where(name => name is not ("MathNet.Numerics" or "netstandard" or "mscorlib")
                           && !name.StartsWith("System.", StringComparison.Ordinal));

        Assert.Empty(foreign);
    }

    [Fact]
    public void Library_UsesNoFileClockOrThread()
    {
        var outside = NamespaceGraph.Read(Library).Where(use => Outside.Contains($"{use.ToNamespace}.{use.To}"));

        Assert.Empty(outside);
    }

    [Fact]
    public void PublicTypes_AreSealedOrStaticOrAbstract()
    {
        var open = Library.GetExportedTypes().Where(type => type.IsClass && !type.IsSealed && !type.IsAbstract);

        Assert.Empty(open);
    }

    [Fact]
    public void PublicTypes_HaveNoSetterButInit()
    {
        var settable = Library.GetExportedTypes().SelectMany(PropertiesOf)
            .Where(property => property.SetMethod is { } set && IsVisible(set) && !IsInit(set))
            .Select(Name);

        Assert.Empty(settable);
    }

    [Fact]
    public void PublicTypes_HaveNoMutableField()
    {
        var mutable = Library.GetExportedTypes().SelectMany(FieldsOf)
            .Where(field => (field.IsPublic || field.IsFamily || field.IsFamilyOrAssembly) && !field.IsInitOnly && !field.IsLiteral)
            .Where(field => !field.IsSpecialName)
            .Select(Name);

        Assert.Empty(mutable);
    }

    [Fact]
    public void PublicTypes_ShowNoArrayOrMutableCollection()
    {
        var exposed = Library.GetExportedTypes().SelectMany(PropertiesOf)
            .Where(property => property.GetMethod is { } get && IsVisible(get) && IsMutableCollection(property.PropertyType))
            .Select(Name);

        Assert.Empty(exposed);
    }

    [Fact]
    public void PublicStructs_AreReadOnly()
    {
        var open = Library.GetExportedTypes().Where(type => type is { IsValueType: true, IsEnum: false }
                                                            && !type.IsDefined(typeof(IsReadOnlyAttribute), false));

        Assert.Empty(open);
    }

    private static bool IsOurs(string name) => name == Root || name.StartsWith(Root + ".", StringComparison.Ordinal);

    private static bool IsVisible(MethodBase method) => method.IsPublic || method.IsFamily || method.IsFamilyOrAssembly;

    private static bool IsInit(MethodInfo set) =>
        set.ReturnParameter.GetRequiredCustomModifiers().Contains(typeof(IsExternalInit));

    private static bool IsMutableCollection(Type type) => type.IsArray || (type.IsGenericType
        && type.GetGenericTypeDefinition() is var open
        && (open == typeof(List<>) || open == typeof(Dictionary<,>) || open == typeof(HashSet<>)
            || open == typeof(IList<>) || open == typeof(ICollection<>) || open == typeof(IDictionary<,>)));

    private const BindingFlags Declared =
        BindingFlags.Public | BindingFlags.NonPublic | BindingFlags.Instance | BindingFlags.Static | BindingFlags.DeclaredOnly;

    private static PropertyInfo[] PropertiesOf(Type type) => type.GetProperties(Declared);

    private static FieldInfo[] FieldsOf(Type type) => type.GetFields(Declared);

    private static string Name(MemberInfo member) => $"{member.DeclaringType}.{member.Name}";
}
