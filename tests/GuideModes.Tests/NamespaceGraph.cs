using Mono.Cecil;
using Mono.Cecil.Cil;

namespace GuideModes.Tests;

/// <summary>Which namespace of a compiled assembly uses which other, and where.</summary>
/// <remarks>
/// Reads what the compiler wrote: base types, interfaces, constraints, attributes and their arguments, fields,
/// signatures, local variables, every instruction's operand and every catch clause, with generic arguments and element
/// types. A constant leaves no trace in the code that uses it, because the compiler copies its value.
/// </remarks>
internal static class NamespaceGraph
{
    /// <summary>One use: <paramref name="From"/> is the type that holds the code, <paramref name="To"/> the type it names.</summary>
    internal sealed record Use(string FromNamespace, string From, string ToNamespace, string To)
    {
        public override string ToString() => $"{FromNamespace}.{From} uses {ToNamespace}.{To}";
    }

    /// <summary>Every distinct use of another type by hand-written code in the assembly.</summary>
    public static IReadOnlyList<Use> Read(System.Reflection.Assembly assembly)
    {
        using var module = ModuleDefinition.ReadModule(assembly.Location);
        return [.. HandWritten(module).SelectMany(UsesOf).Distinct()];
    }

    /// <summary>The namespaces that hold hand-written types.</summary>
    public static IReadOnlyList<string> Namespaces(System.Reflection.Assembly assembly)
    {
        using var module = ModuleDefinition.ReadModule(assembly.Location);
        return [.. HandWritten(module).Select(type => type.Namespace).Distinct().Order(StringComparer.Ordinal)];
    }

    private static IEnumerable<TypeDefinition> HandWritten(ModuleDefinition module) =>
        module.Types.Where(type => type.Name != "<Module>" && !IsGenerated(type));

    private static bool IsGenerated(TypeDefinition type) => type.CustomAttributes.Any(attribute =>
        attribute.AttributeType.Name is "CompilerGeneratedAttribute" or "GeneratedCodeAttribute");

    private static IEnumerable<Use> UsesOf(TypeDefinition type) =>
        WithNested(type).SelectMany(NamedBy).SelectMany(Parts).Select(Outermost)
            .Where(used => used.FullName != type.FullName)
            .Select(used => new Use(type.Namespace, type.Name, used.Namespace, used.Name));

    private static IEnumerable<TypeDefinition> WithNested(TypeDefinition type) =>
        type.NestedTypes.SelectMany(WithNested).Prepend(type);

    private static IEnumerable<TypeReference?> NamedBy(TypeDefinition type) =>
    [
        type.BaseType,
        .. type.Interfaces.Select(i => i.InterfaceType),
        .. type.Interfaces.SelectMany(NamedByAttributes),
        .. NamedByConstraints(type),
        .. NamedByAttributes(type),
        .. type.Fields.SelectMany(field => NamedByAttributes(field).Prepend(field.FieldType)),
        .. type.Properties.SelectMany(property => NamedByAttributes(property).Prepend(property.PropertyType)),
        .. type.Events.SelectMany(@event => NamedByAttributes(@event).Prepend(@event.EventType)),
        .. type.Methods.SelectMany(NamedBy),
    ];

    private static IEnumerable<TypeReference?> NamedBy(MethodDefinition method) =>
    [
        .. NamedBySignature(method),
        .. method.Overrides.SelectMany(NamedBySignature),
        .. NamedByConstraints(method),
        .. NamedByAttributes(method),
        .. NamedByAttributes(method.MethodReturnType),
        .. method.Parameters.SelectMany(NamedByAttributes),
        .. method.HasBody ? NamedBy(method.Body) : [],
    ];

    private static IEnumerable<TypeReference?> NamedBy(MethodBody body) =>
    [
        .. body.Variables.Select(variable => variable.VariableType),
        .. body.ExceptionHandlers.Select(handler => handler.CatchType),
        .. body.Instructions.SelectMany(instruction => NamedByOperand(instruction.Operand)),
    ];

    private static IEnumerable<TypeReference?> NamedByOperand(object? operand) => operand switch
    {
        TypeReference type => [type],
        FieldReference field => [field.DeclaringType, field.FieldType],
        GenericInstanceMethod method => [.. method.GenericArguments, .. NamedBySignature(method)],
        IMethodSignature method => NamedBySignature(method),
        _ => [],
    };

    private static IEnumerable<TypeReference?> NamedBySignature(IMethodSignature method) =>
    [
        (method as MethodReference)?.DeclaringType,
        method.ReturnType,
        .. method.Parameters.Select(parameter => parameter.ParameterType),
    ];

    private static IEnumerable<TypeReference?> NamedByConstraints(IGenericParameterProvider owner) =>
        owner.GenericParameters.SelectMany(parameter =>
            parameter.Constraints.Select(constraint => constraint.ConstraintType).Concat(NamedByAttributes(parameter)));

    private static IEnumerable<TypeReference?> NamedByAttributes(ICustomAttributeProvider owner) =>
        owner.CustomAttributes.SelectMany(attribute => attribute.ConstructorArguments
            .Concat(attribute.Fields.Concat(attribute.Properties).Select(named => named.Argument))
            .SelectMany(NamedByArgument)
            .Prepend(attribute.AttributeType));

    private static IEnumerable<TypeReference?> NamedByArgument(CustomAttributeArgument argument) => argument.Value switch
    {
        TypeReference type => [argument.Type, type],
        CustomAttributeArgument boxed => NamedByArgument(boxed),
        CustomAttributeArgument[] many => many.SelectMany(NamedByArgument).Prepend(argument.Type),
        _ => [argument.Type],
    };

    /// <summary>The plain types a reference is made of: List&lt;A[]&gt; is made of List and A.</summary>
    private static IEnumerable<TypeReference> Parts(TypeReference? type) => type switch
    {
        null or GenericParameter => [],
        GenericInstanceType generic => generic.GenericArguments.SelectMany(Parts).Concat(Parts(generic.ElementType)),
        FunctionPointerType pointer => NamedBySignature(pointer).SelectMany(Parts),
        IModifierType modified => Parts(modified.ModifierType).Concat(Parts(modified.ElementType)),
        TypeSpecification wrapped => Parts(wrapped.ElementType),
        _ => [type],
    };

    private static TypeReference Outermost(TypeReference type) => type.DeclaringType is { } holder ? Outermost(holder) : type;
}
